/**
 * A depot that is hard to print: the demo's bays in two runs, with long names, words without a space,
 * what is not known, damage of frames and beams, sag, rules changed and checks left out.
 */
import { changeRule, editBay, editEntry, editFrame, editLevel, editRun, editSite, leaveOut } from '../../src-core/site/edits';
import type { RuleSetName } from '../../src-core/checks/rule-sets';
import type { Site } from '../../src-core/site/site';
import {
  attachPhoto,
  finishBay,
  markLock,
  note,
  recordDamage,
  recordPlumb,
  recordSag,
  restInOrder,
  seeNotice,
} from '../../src-core/visit/edits';
import { startVisit, type Photo, type Visit } from '../../src-core/visit/visit';
import { demoSite } from '../fixtures/demo-site';

const ONE_WORD = 'Donaudampfschifffahrtsgesellschaftskapitänsmützenkarton';
const LONG = 'Überlauf-Stellplatz “é” in der Nordhälfte der Halle';

export function hardSite(set: RuleSetName): Site {
  let site = editSite(demoSite(), { name: 'Zentrallager Überlingen “Süd”, Bestände der Frühjahrskampagne und Überhänge', units: 'metric' });
  site = { ...site, rules: { ...site.rules, set } };
  site = editRun(site, 'run-a', { name: LONG });
  site = editRun(site, 'run-b', { floorId: null });
  site = editBay(site, 'a1', { name: ONE_WORD });
  site = editBay(site, 'a2', { name: `${LONG} 2` });
  site = editBay(site, 'b3', { noticeId: null });
  site = editEntry(site, 'unitLoads', 'castings', { name: `${ONE_WORD} nº 7` });
  site = editEntry(site, 'unitLoads', 'soap', { name: 'Soap powder in cartons, mixed sizes, “Café crème” range, third-party stock' });
  site = editEntry(site, 'notices', 'notice-b', {
    name: `LN-B, ${'replaced after the change by the plate at the end of the run, '.repeat(3)}rev. 4`,
  });
  const source = {
    kind: 'maker' as const,
    detail: 'letter of the maker, with its annexes and the drawings, '.repeat(10),
    person: LONG,
    date: '2026-05-04',
  };
  site = editEntry(site, 'frameTypes', 'frame-1100', { source });
  const damage = { gaugeMm: 1000, torn: false, note: '', found: '2026-11-23' } as const;
  site = editFrame(site, 'a-f1', {
    name: ONE_WORD,
    damages: [
      { ...damage, id: 'd1', member: 'upright-front', alongMm: 12, acrossMm: null, torn: true, note: `struck by “${ONE_WORD}”` },
      { ...damage, id: 'd2', member: 'bracing', alongMm: 12, acrossMm: 11, found: '' },
    ],
  });
  const [level] = site.runs[1]?.bays[1]?.levels ?? [];
  if (level === undefined) throw new Error('the demo has no bay B2 with levels');
  site = editLevel(site, level.id, {
    locks: 'no',
    beamDamages: [{ id: 'bd', beam: 'front', member: 'connector', torn: true, note: 'hook bent out', found: '2026-11-20' }],
    sags: [{ beam: 'front', loadedMm: 17, unloadedMm: 4, sidewaysMm: null, found: '2026-11-20' }],
  });
  site = changeRule(site, 'closeAbove', 0.8, 'house rule, agreed with the safety committee on 3 March 2026');
  return leaveOut(site, 'heavy-low', 'pickers’ reach');
}

export function hardVisit(site: Site, photos: readonly Photo[]): Visit {
  const bays = site.runs.flatMap((run) => run.bays.map((bay, index) => ({ run, bay, frame: run.frames[index] })));
  let visit = startVisit({
    id: 'v',
    siteId: site.id,
    name: `Round of week 49, ${LONG}`,
    kind: 'weekly',
    person: 'R. Walker-Österreicher',
    started: '2026-11-30',
    bays: bays.map(({ run, bay }) => ({ runId: run.id, bayId: bay.id })),
  });
  bays.forEach(({ bay: { id, levels }, frame }, i) => {
    const levelId = levels[0]?.id;
    if (i % 2 === 0 && frame !== undefined && levelId !== undefined) {
      const found = { torn: false, note: `seen at ${ONE_WORD}`, found: '2026-11-30' };
      visit = recordDamage(visit, id, {
        ...found,
        id: `f${i}`,
        on: 'frame',
        frameId: frame.id,
        member: 'upright-rear',
        alongMm: 7,
        acrossMm: 4,
        gaugeMm: 1000,
      });
      visit = recordDamage(visit, id, { ...found, id: `b${i}`, on: 'beam', levelId, beam: 'front', member: 'connector', torn: true });
      visit = recordSag(visit, id, { levelId, beam: 'front', loadedMm: 17, unloadedMm: i % 4 === 0 ? 4 : null, sidewaysMm: null });
      visit = recordPlumb(visit, id, { frameId: frame.id, alongMm: 14, acrossMm: 3, heightMm: 4500, loaded: true });
      visit = markLock(visit, id, { levelId, beam: 'front', end: 'left' }, true);
      visit = seeNotice(visit, id, { there: 'yes', matches: 'no', firstBeamMm: 1650, levels: 4, beams: 'no', note: 'painted over' });
    }
    visit = note(visit, id, `Aisle blocked by ${ONE_WORD}; a pallet was taken out.`);
    if (i !== 3)
      visit = finishBay(restInOrder(visit, id), id, { person: i % 3 === 0 ? 'S. Officer' : 'R. Walker-Österreicher', date: '2026-11-30' });
  });
  const first = bays[0]?.bay.id ?? '';
  return photos.reduce((after, photo) => attachPhoto(after, bays[3]?.bay.id ?? first, photo), visit);
}

/**
 * Bay scenario S10 of test/reference/scenarios.md, "the safety officer's bay": no notice, three pallets of
 * 620 kg declared, beams measured as boxes 120 × 50 × 1.5, sag 17 mm loaded and 4 mm unloaded, the left
 * frame's front upright bent 8 mm along and 4 mm across, one diagonal 12 mm, one lock missing.
 */
import { editEntry, editBay } from '../../../src-core/site/edits';
import type { Site } from '../../../src-core/site/site';
import { answer, finishBay, markLock, recordDamage, recordSag, restInOrder, seeNotice } from '../../../src-core/visit/edits';
import { boxSecondMoment } from '../../../src-core/checks/implied-load';
import { startVisit, type Visit } from '../../../src-core/visit/visit';
import { siteOf } from './make-run';

export const S10_DAY = '2026-06-02';

/** The officer's bay is A2 of three; its left frame, A-F2, is shared with A1. */
export function s10Site(): Site {
  const site = editEntry(siteOf({ bays: 3, levels: 1 }), 'beamTypes', 'beam', {
    name: 'Box 120 × 50 × 1.5',
    secondMomentMm4: boxSecondMoment(120, 50, 1.5),
    elasticModulusNPerMm2: 210_000,
  });
  return editBay(site, 'A-bay-2', { noticeId: null });
}

export function s10Visit(): Visit {
  const bayId = 'A-bay-2';
  let visit = startVisit({
    id: 'v-s10',
    siteId: 'site',
    name: 'Bay A2 after a report',
    kind: 'event',
    person: 'S. Officer',
    started: S10_DAY,
    bays: [{ runId: 'run-A', bayId }],
  });
  const frame = { on: 'frame', frameId: 'A-frame-2', gaugeMm: 1000, torn: false, note: '', found: S10_DAY } as const;
  visit = recordDamage(visit, bayId, { ...frame, id: 'bend-upright', member: 'upright-front', alongMm: 8, acrossMm: 4 });
  visit = recordDamage(visit, bayId, { ...frame, id: 'bend-diagonal', member: 'bracing', alongMm: 12, acrossMm: 0 });
  visit = recordSag(visit, bayId, { levelId: 'A2-level-1', beam: 'front', loadedMm: 17, unloadedMm: 4, sidewaysMm: null });
  visit = markLock(visit, bayId, { levelId: 'A2-level-1', beam: 'front', end: 'left' }, true);
  visit = seeNotice(answer(visit, bayId, 'notices', 'no'), bayId, { there: 'no' });
  visit = restInOrder(visit, bayId);
  return finishBay(visit, bayId, { person: 'S. Officer', date: S10_DAY });
}

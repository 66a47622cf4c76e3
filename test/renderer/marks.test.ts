import { expect, test } from 'vitest';
import { editFrame, editLevel } from '../../src-core/site/edits';
import type { Damage, Site } from '../../src-core/site/site';
import { bayMarks, type BayMarks } from '../../src-renderer/drawing/marks';
import { siteOf } from '../core/visit/make-run';

const TODAY = '2026-06-20';
const bow = (part: Partial<Damage>): Damage => ({
  id: 'd',
  member: 'upright-front',
  alongMm: 8,
  acrossMm: 0,
  gaugeMm: 1000,
  torn: false,
  note: '',
  found: '2026-06-02',
  ...part,
});

function marks(site: Site, today = TODAY): BayMarks {
  const [run] = site.runs;
  const bay = run?.bays[1];
  if (run === undefined || bay === undefined) throw new Error('the site has no second bay');
  return bayMarks(site, run, bay, today, { units: 'metric', locale: 'en-GB' });
}

test('a bay in which nothing was found bears no mark', () => {
  expect(marks(siteOf())).toEqual({
    left: { class: null, set: false, found: [] },
    right: { class: null, set: false, found: [] },
    levels: new Map(),
    all: [],
  });
});

test('an upright bears the worst class of its damages, as it is on the day, and each is told', () => {
  const site = editFrame(siteOf(), 'A-frame-2', { damages: [bow({ alongMm: 4 }), bow({ id: 'e' })] });
  expect(marks(site).left).toEqual({
    class: 'amber',
    set: false,
    found: [
      { id: 'd', part: 'Front upright of frame A-F2', class: 'green', word: 'Green' },
      { id: 'e', part: 'Front upright of frame A-F2', class: 'amber', word: 'Amber' },
    ],
  });
  expect(marks(site).right.class).toBeNull();
  // Amber counts as red after four weeks (facts F-84).
  expect(marks(site, '2026-06-30').left.class).toBe('amber');
  expect(marks(site, '2026-07-01').left.class).toBe('red');
  const unread = editFrame(site, 'A-frame-3', { damages: [bow({ id: 'd3', acrossMm: null }), bow({ id: 'd4' })] });
  expect(marks(unread).right.class).toBe('unclassed');
});

test('a damaged beam is red; a measured set is marked without a class, and a sag that was read straight is not', () => {
  const site = editLevel(siteOf(), 'A2-level-1', {
    beamDamages: [{ id: 'b', beam: 'rear', member: 'connector', torn: false, note: '', found: '' }],
    sags: [
      { beam: 'front', loadedMm: 9, unloadedMm: 2, sidewaysMm: 3, found: TODAY },
      { beam: 'rear', loadedMm: 9, unloadedMm: 0, sidewaysMm: null, found: TODAY },
    ],
  });
  const at = marks(site).levels.get('A2-level-1');
  expect(at).toMatchObject({ class: 'red', set: true });
  expect(at?.found.map(({ part, word }) => `${part}: ${word}`)).toEqual([
    'Connector of the rear beam of level 1: Red',
    'Front beam of level 1: stays bent 2\u00a0mm down, 3\u00a0mm sideways',
  ]);
});

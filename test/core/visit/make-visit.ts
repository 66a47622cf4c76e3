/** A round of two bays, for the tests of visits. */
import { startVisit, type FrameDamage, type Visit } from '../../../src-core/visit/visit';

export const round: Visit = startVisit({
  id: 'v1',
  siteId: 's1',
  name: 'Week 23, aisle 4',
  kind: 'weekly',
  person: 'R. Walker',
  started: '2026-06-02',
  bays: [
    { runId: 'run1', bayId: 'bay1' },
    { runId: 'run1', bayId: 'bay2' },
  ],
});

export const bend = (part: Partial<FrameDamage> = {}): FrameDamage => ({
  id: 'd1',
  on: 'frame',
  frameId: 'frame1',
  member: 'upright-front',
  alongMm: 8,
  acrossMm: 4,
  gaugeMm: 1000,
  torn: false,
  note: '',
  found: '2026-06-02',
  ...part,
});

import { expect, test } from 'vitest';
import { readFileSync } from 'node:fs';
import { readUnchecked } from '../../src-core/site/envelope';
import { movePlacement } from '../../src-core/site/edits';
import { readSite } from '../../src-core/site/read';
import type { Site } from '../../src-core/site/site';
import { bayDrawn } from '../../src-renderer/drawing/bay-model';
import { librariesOf } from '../../src-renderer/drawing/libraries';

function demo(): Site {
  const file = readUnchecked(readFileSync(new URL('../../assets/demo.tallybeam.json', import.meta.url), 'utf8'));
  const reading = file.ok ? readSite(file.site) : null;
  if (!reading?.ok) throw new Error('the demo site does not read');
  return reading.site;
}

const site = demo();
const drawnOf = (of: Site) => of.runs.flatMap((run) => run.bays.map((bay) => bayDrawn(run, bay, librariesOf(of))));

test('every bay of the demo is drawn with all its goods, beams within its height and none in mid-air', () => {
  for (const run of site.runs) {
    for (const bay of run.bays) {
      const drawn = bayDrawn(run, bay, librariesOf(site));
      const placements = [...bay.onFloor, ...bay.levels.flatMap((level) => level.placements)];
      expect(drawn.levels.flatMap((level) => level.goods)).toHaveLength(placements.length);
      for (const level of drawn.levels) {
        expect(level.height).toBeLessThan(drawn.height);
        for (const goods of level.goods) {
          const lowest = Math.min(...[...goods.outline.goods, ...goods.outline.pallet].flat().map((point) => point.y));
          expect(lowest).toBe(0);
        }
      }
    }
  }
});

test('a move draws the bays it touches anew and no other', () => {
  const before = drawnOf(site);
  const bay = site.runs[0]?.bays.find((one) => one.levels.some((level) => level.placements.length > 0));
  const level = bay?.levels.find((one) => one.placements.length > 0);
  const placement = level?.placements[0];
  if (!bay || !level || !placement) throw new Error('the demo has no goods in its first run');
  const after = drawnOf(movePlacement(site, placement.id, { levelId: level.id, atMm: placement.atMm + 1 }));
  const changed = after.filter((drawn, i) => drawn !== before[i]);
  expect(changed.map(({ bayId }) => bayId)).toEqual([bay.id]);
});

test('goods that stand in one another are both told, and those past the end', () => {
  const bay = site.runs[0]?.bays.find((one) => one.levels.some((level) => level.placements.length > 1));
  const level = bay?.levels.find((one) => one.placements.length > 1);
  const [first, second] = level?.placements ?? [];
  if (!level || !first || !second) throw new Error('the demo has no level with two unit loads');
  const drawn = (atMm: number) =>
    drawnOf(movePlacement(site, second.id, { levelId: level.id, atMm }))
      .flatMap((one) => one.levels)
      .find((one) => one.levelId === level.id)?.goods;
  const overlapping = drawn(first.atMm + 10) ?? [];
  const trouble = (id: string) => overlapping.find((goods) => goods.placementId === id)?.trouble;
  expect([trouble(first.id), trouble(second.id)]).toEqual(['overlap', 'overlap']);
  expect(drawn(100_000)?.find((goods) => goods.placementId === second.id)?.trouble).toBe('off the end');
});

/**
 * Scenarios S1, S2, S6, S7 and S10 of test/reference/scenarios.md (invented racks; every figure is statics,
 * checked there by a script): the parts that concern the beams of a level, to every printed digit.
 */
import { expect, test } from 'vitest';
import type { LevelAudit } from '../../../src-core/audit/types';
import type { CheckName } from '../../../src-core/checks/finding';
import { STANDARD_GRAVITY } from '../../../src-core/units/quantity';
import { plain } from '../plain';
import { expectWorked } from '../worked';
import { auditedLevel, findingOf } from './audited';
import { goods, level, stand, type Rack } from './rack';

/** Even mass and utilisation of a check, as they are printed. */
const printed = (audited: LevelAudit, check: CheckName, digits = 1): string => {
  const { demand, utilisation } = findingOf(audited, check);
  return `${demand?.value.toFixed(digits)} (${utilisation?.toFixed(3)})`;
};

const kg = (force: number | undefined) => ((force ?? NaN) / STANDARD_GRAVITY) * 2;

const three = (unitLoad: ReturnType<typeof goods>): Rack => ({
  unitLoads: [unitLoad],
  levels: [level([stand('a', 75), stand('a', 950), stand('a', 1825)])],
});

test('S1: three pallets of 800 kg on 2 500 kg', () => {
  const found = auditedLevel(three(goods('a')));
  expect(printed(found, 'level-total', 0)).toBe('2400 (0.960)');
  expect(printed(found, 'beam-bending')).toBe('2488.9 (0.996)');
  expect(printed(found, 'beam-end-shear', 0)).toBe('2400 (0.960)');
  expect(printed(found, 'beam-deflection')).toBe('2483.8 (0.994)');
  expect(kg(found.effects?.front.reactionLeft)).toBeCloseTo(1200, 9);
  expect(kg(found.effects?.front.sagging.moment) / 1000).toBeCloseTo(840, 9);
  expect(found.effects?.front.sagging.from).toBeCloseTo(1350, 9);
  expect(found.effects?.front.centroid).toBeCloseTo(1350, 9);
  expect(findingOf(found, 'unit-load').verdict).toBe('close');
});

test('S1: judged as a designed full complement: close, with no alarm by bending, and its factor 1.037 noted', () => {
  const found = auditedLevel(three(goods('a')));
  expect(found.verdict).toBe('close');
  const complement = findingOf(found, 'full-complement');
  expect(complement.counts).toBe(true);
  expect(complement.utilisation).toBeCloseTo(0.96, 12);
  expect(complement.notes.map(plain).join(' ')).toContain('1.03704 times the total');
  for (const check of ['beam-bending', 'beam-end-shear', 'beam-deflection'] as const) expect(findingOf(found, check).counts).toBe(false);
});

test.each([
  ['¼–½–¼', [0.25, 0.5, 0.25], '850.0', '2518.5 (1.007)'],
  ['⅓ each', [1 / 3, 1 / 3, 1 / 3], '826.7', '2449.4 (0.980)'],
])('S1: on three runners, %s', (_, shares, moment, bending) => {
  const feet = [50, 400, 750].map((xMm, i) => ({ xMm, share: shares[i] ?? 0 }));
  const found = auditedLevel(three(goods('a', { bearing: { kind: 'feet', feet } })));
  expect((kg(found.effects?.front.sagging.moment) / 1000).toFixed(1)).toBe(moment);
  expect(printed(found, 'beam-bending')).toBe(bending);
  // "Do not raise an alarm for 1.007": the full complement is judged by its total.
  expect(found.verdict).toBe('close');
});

const machine = (atMm: number, change: Partial<ReturnType<typeof goods>> = {}, beam: Rack['beam'] = {}): LevelAudit =>
  auditedLevel({
    unitLoads: [goods('m', { name: 'Machine', widthMm: 1000, goodsKg: 1600, ...change })],
    levels: [level([stand('m', atMm)])],
    notice: { levelKg: [2000], unitLoadKg: 2000 },
    beam,
  });

test('S2: one machine of 1 600 kg at mid-span: 0.80 by total, 1.304 by bending', () => {
  const found = machine(850);
  expect(printed(found, 'level-total', 0)).toBe('1600 (0.800)');
  expect(printed(found, 'beam-bending')).toBe('2607.4 (1.304)');
  expect(printed(found, 'beam-deflection')).toBe('2400.7 (1.200)');
  expect(printed(found, 'beam-end-shear', 0)).toBe('1600 (0.800)');
  expect(found.verdict).toBe('over');
  expect(found.governing?.check).toBe('beam-bending');
  expect(plain(findingOf(found, 'beam-bending').says)).toBe(
    'Level 1 carries 1600 kg, but it bends each beam as 2607.41 kg evenly spread on the pair would. The notice allows 2000 kg.',
  );
});

test('S2: as a true point 3 200 kg', () => {
  const found = machine(850, { bearing: { kind: 'feet', feet: [{ xMm: 500, share: 1 }] } });
  expect(printed(found, 'beam-bending', 0)).toBe('3200 (1.600)');
});

test('S2: moved hard left it passes by bending and is beyond what the notice proves for the beam end', () => {
  const found = machine(75);
  expect(found.effects?.front.centroid).toBeCloseTo(575, 9);
  expect(kg(found.effects?.front.reactionLeft).toFixed(1)).toBe('1259.3');
  expect(kg(found.effects?.front.reactionRight).toFixed(1)).toBe('340.7');
  expect((kg(found.effects?.front.sagging.moment) / 1000).toFixed(2)).toBe('589.99');
  expect(found.effects?.front.sagging.from.toFixed(0)).toBe('862');
  expect(printed(found, 'beam-bending')).toBe('1748.1 (0.874)');
  expect(printed(found, 'beam-deflection')).toBe('1482.2 (0.741)');
  expect(printed(found, 'beam-end-shear')).toBe('2518.5 (1.259)');
  const end = findingOf(found, 'beam-end-shear');
  expect(end.place).toMatchObject({ end: 'left' });
  expect(plain(end.says)).toContain('beyond what the notice proves');
  expect(found.governing?.check).toBe('beam-end-shear');
});

test.each([
  [20, '0.122', '2635'],
  [50, '0.257', '2673'],
  [100, '0.409', '2726'],
])('S2: with connectors of %d kN·m/rad', (stiffness, fixity, bending) => {
  const section = { secondMomentMm4: 195e9 / 210_000, elasticModulusNPerMm2: 210_000, connectorNmmPerRad: stiffness * 1e6 };
  const found = machine(850, {}, section);
  const bent = findingOf(found, 'beam-bending');
  expect(bent.demand?.value.toFixed(0)).toBe(bending);
  expect(bent.notes.map(plain).join(' ')).toContain('stiffness of the connectors is known');
  const used = bent.worked.flatMap(({ values }) => values).find(({ symbol }) => symbol === 'f');
  expect(used?.quantity.value.toFixed(3)).toBe(fixity);
  expectWorked(bent);
});

test('S6: a pile sloping from 250 to 650 kg/m', () => {
  const found = auditedLevel({
    unitLoads: [
      goods('s', {
        widthMm: 2400,
        goodsKg: null,
        bearing: { kind: 'sloped', slope: { by: 'intensities', leftKgPerM: 250, rightKgPerM: 650 } },
      }),
    ],
    levels: [level([stand('s', 0)])],
    notice: { levelKg: [1200], unitLoadKg: 1200, unitLoadsPerLevel: 1 },
    rules: { fullComplement: false },
    bay: { clearEntryMm: 2400 },
  });
  expect(printed(found, 'level-total', 0)).toBe('1080 (0.900)');
  expect(((found.effects?.front.centroid ?? NaN) / 1000).toFixed(4)).toBe('1.3778');
  expect(kg(found.effects?.front.reactionRight)).toBeCloseTo(620, 9);
  expect(kg(found.effects?.front.reactionLeft)).toBeCloseTo(460, 9);
  expect((kg(found.effects?.front.sagging.moment) / 1000).toFixed(2)).toBe('325.76');
  expect(found.effects?.front.sagging.from.toFixed(1)).toBe('1287.5');
  expect(printed(found, 'beam-bending')).toBe('1085.9 (0.905)');
  expect(printed(found, 'beam-deflection')).toBe('1080.4 (0.900)');
  expect(printed(found, 'beam-end-shear')).toBe('1240.0 (1.033)');
  expect(findingOf(found, 'beam-end-shear').place.end).toBe('right');
  expect(found.verdict).toBe('over');
});

test('S6: the same weight in three steps of 300, 600 and 450 kg/m', () => {
  const found = auditedLevel({
    unitLoads: [
      goods('s', {
        widthMm: 2400,
        goodsKg: null,
        bearing: { kind: 'stepped', columns: [240, 480, 360].map((massKg) => ({ widthMm: 800, massKg })) },
      }),
    ],
    levels: [level([stand('s', 0)])],
    notice: { levelKg: [1200], unitLoadKg: 1200, unitLoadsPerLevel: 1 },
    rules: { fullComplement: false },
    bay: { clearEntryMm: 2400 },
  });
  expect(((found.effects?.front.centroid ?? NaN) / 1000).toFixed(4)).toBe('1.2889');
  expect(kg(found.effects?.front.reactionLeft)).toBeCloseTo(500, 9);
  expect(kg(found.effects?.front.reactionRight)).toBeCloseTo(580, 9);
  expect((kg(found.effects?.front.sagging.moment) / 1000).toFixed(2)).toBe('360.33');
  expect(found.effects?.front.sagging.from.toFixed(1)).toBe('1233.3');
  expect(printed(found, 'beam-bending')).toBe('1201.1 (1.001)');
  expect(printed(found, 'beam-end-shear')).toBe('1160.0 (0.967)');
  expect(printed(found, 'beam-deflection')).toBe('1173.4 (0.978)');
  expect(found.governing?.check).toBe('beam-bending');
});

test('S7: archive boxes and a motor on a shelf of 1.80 m: the beams are fine', () => {
  // The boxes as two rows, front and rear of the motor, so that nothing stands in anything else.
  const row = goods('row', { widthMm: 1800, depthMm: 150, goodsKg: 60 });
  const motor = goods('motor', { widthMm: 300, depthMm: 300, goodsKg: 130 });
  const found = auditedLevel({
    unitLoads: [row, motor],
    levels: [level([stand('row', 0, { towardsFrontMm: 225 }), stand('row', 0, { towardsFrontMm: -225 }), stand('motor', 750)])],
    notice: { levelKg: [400], unitLoadKg: 150, unitLoadsPerLevel: 9 },
    frame: { depthMm: 600 },
    bay: { clearEntryMm: 1800 },
  });
  expect(findingOf(found, 'placement').verdict).toBe('within');
  expect(printed(found, 'level-total', 0)).toBe('250 (0.625)');
  expect(printed(found, 'beam-bending')).toBe('358.3 (0.896)');
  expect(printed(found, 'beam-deflection')).toBe('325.2 (0.813)');
});

const MEASURED = { secondMomentMm4: 927_016, elasticModulusNPerMm2: 210_000 };

test('S10: a bay without a notice is not assessable, and says what it does to its beams all the same', () => {
  const found = auditedLevel({ ...three(goods('a', { goodsKg: 620 })), notice: null, beam: MEASURED });
  expect(found.verdict).toBe('not-assessable');
  expect(found.totalKg).toBe(1860);
  expect(found.ratedKg).toBeNull();
  const bent = findingOf(found, 'beam-deflection');
  expect(bent.demand?.value.toFixed(1)).toBe('1924.9');
  expect(bent.verdict).toBe('not-assessable');
  expect(bent.missing.map(({ field }) => field)).toEqual(['beamType:beam:ratings']);
  expect(findingOf(found, 'section-deflection').demand?.value.toFixed(2)).toBe('12.43');
  expect(findingOf(found, 'section-deflection').allowed?.value).toBe(13.5);
});

test.each([
  [20, '11.21'],
  [50, '9.86'],
  [100, '8.35'],
])('S10: with connectors of %d kN·m/rad', (stiffness, sag) => {
  const found = auditedLevel({
    ...three(goods('a', { goodsKg: 620 })),
    notice: null,
    beam: { ...MEASURED, connectorNmmPerRad: stiffness * 1e6 },
  });
  expect(findingOf(found, 'section-deflection').demand?.value.toFixed(2)).toBe(sag);
  expectWorked(findingOf(found, 'section-deflection'));
});

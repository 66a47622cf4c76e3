/** Goods that cannot stand as they are put down, and inputs of a level that are not KNOWN. */
import { expect, test } from 'vitest';
import type { CheckName } from '../../../src-core/checks/finding';
import { plain } from '../plain';
import { auditedLevel, findingOf } from './audited';
import { goods, KNOWN, level, pallet, SECTION, stand, type Rack } from './rack';

// ---------------------------------------------------------------- goods that cannot stand so

test.each<[string, Rack['levels'], CheckName, string]>([
  ['past the right end', [level([stand('a', 2000)])], 'placement', 'past the right end'],
  ['past the left end', [level([stand('a', -1)])], 'placement', 'past the left end'],
  ['in each other', [level([stand('a', 0), stand('a', 700)])], 'placement', 'stand in each other'],
  ['tipping to the front', [level([stand('a', 0, { towardsFrontMm: 600 })])], 'tipping', 'would tip'],
  ['tipping to the rear', [level([stand('a', 0, { towardsFrontMm: -600 })])], 'tipping', 'would tip'],
])('goods %s are not possible', (_, levels, check, words) => {
  const found = auditedLevel({ unitLoads: [goods('a')], levels });
  expect(found.verdict).toBe('not-possible');
  expect(found.governing?.check).toBe(check);
  expect(plain(findingOf(found, check).says)).toContain(words);
});

test('overlapping goods still add up on the beams', () => {
  const found = auditedLevel({ unitLoads: [goods('a')], levels: [level([stand('a', 0), stand('a', 700)])] });
  expect(findingOf(found, 'beam-bending').demand).not.toBeNull();
  expect(found.totalKg).toBe(1600);
});

test('goods that fill the level exactly stand, whatever the rounding of their measures', () => {
  // 3 × 36 in in 108 in: 914.4 + 914.4 + 914.4 is not exactly 2 743.2 in doubles
  const width = 914.4;
  const found = auditedLevel({
    unitLoads: [goods('a', { widthMm: width })],
    levels: [level([stand('a', 0), stand('a', width), stand('a', width + width)])],
    bay: { clearEntryMm: 108 * 25.4 },
  });
  expect(findingOf(found, 'placement').verdict).toBe('within');
  // An even load is its own equivalent.
  expect(findingOf(found, 'beam-bending').demand?.value).toBeCloseTo(2400, 6);
});

// ---------------------------------------------------------------- unknowns

const judged = ['unit-load', 'level-total', 'beam-bending', 'beam-end-shear', 'beam-deflection'] as const;

test.each<[string, Rack, string, readonly CheckName[]]>([
  ['the goods’ mass', { ...KNOWN, unitLoads: [goods('a', { goodsKg: null, palletId: 'p' }), goods('b')] }, 'unitLoad:a:goodsKg', judged],
  ['a pallet’s mass', { ...KNOWN, pallets: [pallet('p', { massKg: null })] }, 'pallet:p:massKg', judged],
  ['the unit load limit', { ...KNOWN, notice: { ...KNOWN.notice, unitLoadKg: null } }, 'notice:notice:unitLoadKg', ['unit-load']],
  [
    'the number of unit loads',
    { ...KNOWN, notice: { ...KNOWN.notice, unitLoadsPerLevel: null } },
    'notice:notice:unitLoadsPerLevel',
    ['positions'],
  ],
  [
    'the level’s rating',
    { ...KNOWN, notice: { ...KNOWN.notice, levelKg: [null] }, beam: {} },
    'notice:notice:levelKg',
    ['level-total', 'beam-bending', 'beam-end-shear', 'beam-deflection'],
  ],
  ['the notice', { ...KNOWN, notice: null }, 'bay:bay:noticeId', ['unit-load', 'positions']],
  [
    'the section modulus',
    { ...KNOWN, beam: { ...SECTION, sectionModulusMm3: null } },
    'beamType:beam:sectionModulusMm3',
    ['section-stress'],
  ],
  [
    'the design stress',
    { ...KNOWN, beam: { ...SECTION, designStressNPerMm2: null } },
    'beamType:beam:designStressNPerMm2',
    ['section-stress'],
  ],
  ['the second moment', { ...KNOWN, beam: { ...SECTION, secondMomentMm4: null } }, 'beamType:beam:secondMomentMm4', ['section-deflection']],
  [
    'the elastic modulus',
    { ...KNOWN, beam: { ...SECTION, elasticModulusNPerMm2: null } },
    'beamType:beam:elasticModulusNPerMm2',
    ['section-deflection'],
  ],
])('without %s the level is not assessable and says what to enter', (_, change, field, checks) => {
  const found = auditedLevel(change);
  expect(found.verdict).toBe('not-assessable');
  for (const check of checks) {
    const unknown = found.findings.filter((one) => one.check === check && one.verdict === 'not-assessable');
    expect(unknown.length, check).toBeGreaterThan(0);
    expect(
      unknown.flatMap(({ missing }) => missing.map((one) => one.field)),
      check,
    ).toContain(field);
    for (const { input, how } of unknown.flatMap(({ missing }) => missing)) {
      expect(input.length).toBeGreaterThan(3);
      expect(how).toMatch(/^[A-Z].*\.$/);
    }
  }
});

test('an unknown mass is not zero: no total, no effects', () => {
  const found = auditedLevel({ unitLoads: [goods('a', { goodsKg: null })], levels: [level([stand('a', 100)])] });
  expect(found.totalKg).toBeNull();
  expect(found.effects).toBeNull();
});

test('a density finds the mass that was not stated', () => {
  // 0.8 m · 1.2 m · 0.5 m · 1 000 kg/m³ = 480 kg
  const bearing = {
    kind: 'profile',
    points: [
      { xMm: 0, heightMm: 500 },
      { xMm: 800, heightMm: 500 },
    ],
    densityKgPerM3: 1000,
  } as const;
  expect(auditedLevel({ unitLoads: [goods('a', { goodsKg: null, bearing })], levels: [level([stand('a', 100)])] }).totalKg).toBeCloseTo(
    480,
    9,
  );
});

test('a shape that cannot be is not assessable and says how to mend it', () => {
  const bearing = { kind: 'stepped', columns: [{ widthMm: 300, massKg: 100 }] } as const;
  const found = auditedLevel({ unitLoads: [goods('a', { bearing })], levels: [level([stand('a', 100)])] });
  expect(found.verdict).toBe('not-assessable');
  expect(findingOf(found, 'beam-bending').missing[0]).toMatchObject({ field: 'unitLoad:a:bearing' });
  expect(findingOf(found, 'beam-bending').missing[0]?.how).toContain('Make the columns fill the width');
});

test('without any section data stress and sag only inform', () => {
  const found = auditedLevel({ ...KNOWN, beam: {} });
  for (const check of ['section-stress', 'section-deflection'] as const)
    expect(findingOf(found, check)).toMatchObject({ verdict: 'not-assessable', counts: false });
  expect(found.verdict).toBe('within');
});

test('an empty level with a rating is within, and without one is not assessable', () => {
  expect(auditedLevel({ unitLoads: [], levels: [level([])] }).verdict).toBe('within');
  expect(auditedLevel({ unitLoads: [], levels: [level([])], notice: { levelKg: [] } }).verdict).toBe('not-assessable');
});

/** Placement tolerance and heavier goods in a level's verdict: the figures by hand, the words, the worked calculation. */
import { describe, expect, test } from 'vitest';
import type { Finding } from '../../../src-core/checks/finding';
import { expectClose } from '../../close';
import { plain } from '../plain';
import { expectWorked } from '../worked';
import { auditedLevel, findingOf } from './audited';
import { goods, level, stand, type Rack } from './rack';

const notesOf = (finding: Finding): string => finding.notes.map(plain).join(' ');
/** Beam ends that are pinned for sure: the range of their fixity is another reason to be close. */
const PINNED = { key: 'likelyFixity' as const, value: 0, reason: 'pinned' };
const tolerance = (value: number) => ({ changed: [PINNED, { key: 'placementTolerance' as const, value, reason: 'measured' }] });
/** The last line of a worst case's worked calculation. */
const worstUtilisation = (finding: Finding): number =>
  finding.worked.find(({ result }) => result.symbol === 'u_worst')?.result.quantity.value ?? NaN;

// One even unit load, 800 wide, in the middle of 2 700: bending counts as m·(2 − b/L) = m·1.7037 on the pair.
const FACTOR = 2 - 800 / 2700;
// Between the beams 1 100 − 50 mm: 50 mm towards one raises its half to 1/2 + 50/1 050.
const ACROSS = 1 + (2 * 50) / 1050;
/** Stated utilisation by bending. */
const USED = 0.899;
const RATED = (800 * FACTOR) / USED;
const rated = { levelKg: [RATED], unitLoadsPerLevel: 3, unitLoadKg: 1000 };
const single = (more: Partial<Rack> = {}, change: Parameters<typeof goods>[1] = {}): Rack => ({
  unitLoads: [goods('a', { massUncertaintyPercent: 2, ...change })],
  levels: [level([stand('a', 950)])],
  notice: rated,
  rules: { changed: [PINNED] },
  ...more,
});

describe('within as stated and over in the worst case', () => {
  test('is close, with the utilisation of the stated case', () => {
    const found = auditedLevel(single());
    const bent = findingOf(found, 'beam-bending');
    expect(bent.verdict).toBe('close');
    expect(found.verdict).toBe('close');
    expectClose(bent.utilisation, USED);
  });

  test('says both figures and the arrangement in one sentence', () => {
    // In the middle the load is at its worst along the beam; across it and by its mass: 0.899 · 1.02 · (1 + 100/1 050) = 1.00431
    expect(plain(findingOf(auditedLevel(single()), 'beam-bending').says)).toContain(
      ' That is 0.899 of it; with the load 50 mm nearer one beam and 2 % heavier it would be 1.00431, so it is close.',
    );
  });

  test('its worked calculation ends in the worst case after that of the stated one', () => {
    const bent = findingOf(auditedLevel(single()), 'beam-bending');
    expectWorked(bent);
    expectClose(worstUtilisation(bent), USED * 1.02 * ACROSS);
    expect(bent.worked.findIndex(({ result }) => result.symbol === 'u')).toBeLessThan(bent.worked.length - 1);
    const names = bent.worked.map(({ what }) => what);
    expect(names).toContain('Worst case: mass of Goods a');
    expect(names).toContain('Worst case: share of Goods a on the front beam');
  });

  test('along the beam: a load off the middle comes 50 mm nearer to it', () => {
    // M = W·c(L − c)/L·(1 − b/2L); stated c = 1 250, in the worst case 1 300.
    const at = (c: number) => c * (2700 - c);
    const bent = findingOf(auditedLevel(single({ levels: [level([stand('a', 850)])] })), 'beam-bending');
    expectClose(worstUtilisation(bent), (USED * 1.02 * ACROSS * at(1300)) / at(1350));
    expect(notesOf(bent)).toContain('with the load 50 mm nearer the middle, 50 mm nearer one beam and 2 % heavier it would count as');
  });

  test('end shear is greatest with the load towards that end: 4·R', () => {
    // c = 1 350 − 50 from the left end, or as far from the right one.
    const sheared = findingOf(auditedLevel(single()), 'beam-end-shear');
    const kg = 4 * 800 * 1.02 * (ACROSS / 2) * (1400 / 2700);
    expectClose(worstUtilisation(sheared), kg / RATED);
    expectWorked(sheared);
  });

  test('against the maker’s value for one beam end', () => {
    const most = 800 * 1.02 * (ACROSS / 2) * (1400 / 2700);
    const sheared = findingOf(auditedLevel(single({ beam: { endKg: most * 0.999 } })), 'beam-end-shear');
    expectClose(sheared.utilisation, 200 / (most * 0.999));
    expect(sheared.verdict).toBe('close');
    expect(plain(sheared.says)).toContain('so it is close.');
    expect(notesOf(sheared)).toContain(`it would put ${Number(most.toPrecision(6))} kg on the left end`);
    expectWorked(sheared);
    expect(findingOf(auditedLevel(single({ beam: { endKg: most * 1.001 } })), 'beam-end-shear').verdict).toBe('within');
  });

  test('deflection: a load off the middle sags most where it is nearest to it', () => {
    // The sag of an even load under the middle of the beam, 384/5·(8 − 4β² + β³)/384 of the total; β = b/L.
    const beta = 800 / 2700;
    const factor = (8 - 4 * beta ** 2 + beta ** 3) / 5;
    const sagged = findingOf(auditedLevel(single({ levels: [level([stand('a', 910)])] })), 'beam-deflection');
    expectClose(worstUtilisation(sagged), (800 * factor * 1.02 * ACROSS) / RATED, 1e-10);
    expectWorked(sagged);
  });
});

describe('the verdict stays by the stated case', () => {
  test('over is over, and the worst case is a figure beside it', () => {
    const bent = findingOf(auditedLevel(single({ notice: { ...rated, levelKg: [1300] } })), 'beam-bending');
    expect(bent.verdict).toBe('over');
    expect(plain(bent.says)).not.toContain('so it is close');
    expect(notesOf(bent)).toContain('Worst case: with the load 50 mm nearer one beam and 2 % heavier it would count as');
  });

  test('within in the worst case too is within', () => {
    const bent = findingOf(auditedLevel(single({ notice: { ...rated, levelKg: [1600] } })), 'beam-bending');
    expect(bent.verdict).toBe('within');
    expect(plain(bent.says)).not.toContain('close');
    expectClose(worstUtilisation(bent), (800 * FACTOR * 1.02 * ACROSS) / 1600);
  });

  test('a site that sets the tolerance to 0, with goods of sure mass, has no other case than the stated one', () => {
    const bent = findingOf(auditedLevel(single({ rules: tolerance(0) }, { massUncertaintyPercent: 0 })), 'beam-bending');
    expect(bent.verdict).toBe('within');
    expect(notesOf(bent)).not.toContain('Worst case');
    expect(bent.worked.at(-1)?.result.symbol).toBe('u');
  });

  test('a tolerance of 0 leaves the mass alone, and a sure mass leaves the tolerance alone', () => {
    const heavier = findingOf(auditedLevel(single({ rules: tolerance(0) })), 'beam-bending');
    expectClose(worstUtilisation(heavier), USED * 1.02);
    expect(notesOf(heavier)).toContain('with the load 2 % heavier it would count as');
    const shifted = findingOf(auditedLevel(single({}, { massUncertaintyPercent: 0 })), 'beam-bending');
    expectClose(worstUtilisation(shifted), USED * ACROSS);
    expect(notesOf(shifted)).toContain('with the load 50 mm nearer one beam it would count as');
  });

  test('the tolerance is named with where it came from', () => {
    expect(notesOf(findingOf(auditedLevel(single()), 'beam-bending'))).toContain(
      'Placement tolerance: European rule set; common practice, no single document is claimed.',
    );
    expect(notesOf(findingOf(auditedLevel(single({ rules: tolerance(30) })), 'beam-bending'))).toContain(
      'Placement tolerance: changed from the European rule set: measured.',
    );
  });

  test('without the frame’s depth the tolerance is taken along the beam alone, and that is said', () => {
    const bent = findingOf(auditedLevel(single({ frame: null })), 'beam-bending');
    expectClose(worstUtilisation(bent), USED * 1.02);
    expect(notesOf(bent)).toContain('the worst case is by the tolerance along them alone');
  });

  test('a designed full complement is judged by its total: put-away within the tolerance does not count against it', () => {
    const full = single({
      levels: [level([stand('a', 75), stand('a', 950), stand('a', 1825)])],
      notice: { ...rated, levelKg: [2700], unitLoadKg: 900 },
    });
    const found = auditedLevel(full);
    const bent = findingOf(found, 'beam-bending');
    expect(findingOf(found, 'full-complement').counts).toBe(true);
    expect(bent.counts).toBe(false);
    expect(bent.verdict).toBe('close');
    expect(worstUtilisation(bent)).toBeGreaterThan(1);
    expect(plain(bent.says)).not.toContain('so it is close');
    expect(notesOf(bent)).toContain('Ordinary put-away is part of that loading');
    expect(notesOf(bent)).toContain(
      'with its loads, from left to right, 50 mm to the right, not moved and 50 mm to the left, all 50 mm nearer one beam',
    );
  });

  test('with a rating that is not known it is a figure without comparison', () => {
    const bent = findingOf(auditedLevel(single({ notice: null })), 'beam-bending');
    expect(bent.verdict).toBe('not-assessable');
    expect(notesOf(bent)).toMatch(/Worst case: with the load 50 mm nearer one beam and 2 % heavier it would count as [\d.]+ kg\./);
  });
});

test('front and rear: goods in front of the middle go further to the front, and never past the beam', () => {
  // e = 500 of d = 1 050: share 0.97619, with 50 mm more it would be 1.0238 and is taken as 1.
  const bent = findingOf(
    auditedLevel(single({ levels: [level([stand('a', 950, { towardsFrontMm: 500 })])], notice: { ...rated, levelKg: [6000] } })),
    'beam-bending',
  );
  expectClose(worstUtilisation(bent), (2 * 800 * FACTOR * 1.02) / 6000);
  expect(notesOf(bent)).toContain('nearer the front beam');
  expectWorked(bent);
});

test('several unlike loads, turned ones and sprung ends: every worked calculation can be followed', () => {
  const SECTION = { secondMomentMm4: 927_016, sectionModulusMm3: 15_450, elasticModulusNPerMm2: 210_000, designStressNPerMm2: 235 };
  for (const connectorNmmPerRad of [null, 50e6]) {
    const found = auditedLevel({
      unitLoads: [
        goods('a', { goodsKg: 500, massUncertaintyPercent: 5, bearing: { kind: 'sloped', slope: { by: 'ratio', rightOverLeft: 2.5 } } }),
        goods('b', { goodsKg: 300, across: { kind: 'sloped', rearOverFront: 0.5 } }),
      ],
      levels: [level([stand('b', 1750), stand('a', 60, { mirrored: true, towardsFrontMm: 30 }), stand('a', 900)])],
      notice: { levelKg: [2500], unitLoadKg: 900, unitLoadsPerLevel: 4 },
      beam: { ...SECTION, connectorNmmPerRad },
    });
    for (const check of ['beam-bending', 'beam-end-shear', 'beam-deflection'] as const) {
      const one = findingOf(found, check);
      expectWorked(one);
      expect(worstUtilisation(one), check).toBeGreaterThan(one.utilisation ?? NaN);
      expect(notesOf(one)).toContain('up to 5 % heavier');
    }
  }
});

describe('masses that may be more', () => {
  test('a unit load within its limit as stated and over as heavy as it may be is close', () => {
    const found = findingOf(auditedLevel(single({ notice: { ...rated, unitLoadKg: 900 } }, { massUncertaintyPercent: 20 })), 'unit-load');
    expect(found.verdict).toBe('close');
    expectClose(found.utilisation, 800 / 900);
    expect(plain(found.says)).toContain('As heavy as it may be it would come to 960 kg, so it is close.');
  });

  test('of two, the one that may be too heavy comes before the one that is heavier as stated', () => {
    const found = auditedLevel(
      single({
        unitLoads: [goods('a', { goodsKg: 810 }), goods('b', { goodsKg: 790, massUncertaintyPercent: 30 })],
        levels: [level([stand('a', 100), stand('b', 1200)])],
        notice: { ...rated, unitLoadKg: 1000 },
      }),
    ).findings.filter(({ check }) => check === 'unit-load');
    expect(found.map(({ verdict }) => verdict)).toEqual(['close']);
    expect(found.map(({ says }) => plain(says)).join()).toContain('Goods b weighs 790 kg');
  });

  test('a level’s total is close where its goods as heavy as they may be are over', () => {
    const found = findingOf(auditedLevel(single({ notice: { ...rated, levelKg: [900] } }, { massUncertaintyPercent: 15 })), 'level-total');
    expect(found.verdict).toBe('close');
    expectClose(found.utilisation, 800 / 900);
    expect(plain(found.says)).toContain('it would come to 920 kg, so it is close.');
    expect(
      findingOf(auditedLevel(single({ notice: { ...rated, levelKg: [900] } }, { massUncertaintyPercent: 12 })), 'level-total').verdict,
    ).toBe('within');
  });
});

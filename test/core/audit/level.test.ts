import { expect, test } from 'vitest';
import { auditRun } from '../../../src-core/audit/audit';
import type { LevelAudit } from '../../../src-core/audit/types';
import { CHECKS, type CheckName, type Finding } from '../../../src-core/checks/finding';
import { plain } from '../plain';
import { expectWorked } from '../worked';
import { FRAME, goods, level, pallet, rack, stand, type Rack } from './rack';

const audit = (change: Rack): LevelAudit => {
  const found = auditRun(rack(change), 'run', '2026-06-01').bays[0]?.levels[0];
  if (found === undefined) throw new Error('no level audited');
  return found;
};

function of(audited: LevelAudit, check: CheckName): Finding {
  const found = audited.findings.find((one) => one.check === check);
  if (found === undefined) throw new Error(`${check} not made`);
  return found;
}

const SECTION = { secondMomentMm4: 927_016, sectionModulusMm3: 15_450, elasticModulusNPerMm2: 210_000, designStressNPerMm2: 235 };
const OWN = ['placement', 'tipping', 'unit-load', 'positions', 'level-total', 'full-complement'] as const;
const BEAMS = ['beam-bending', 'beam-end-shear', 'beam-deflection', 'section-stress', 'section-deflection'] as const;

/** Two unlike unit loads on pallets, one off the middle, on a level with everything known. */
const known: Rack = {
  pallets: [pallet('p')],
  unitLoads: [
    goods('a', { goodsKg: 500, palletId: 'p' }),
    goods('b', { goodsKg: 300, palletId: 'p', across: { kind: 'sloped', rearOverFront: 0.5 } }),
  ],
  levels: [
    level([stand('a', 100), stand('b', 1200, { towardsFrontMm: 40, mirrored: true })], { deck: { kind: 'support-bars', massKg: 12 } }),
  ],
  notice: { levelKg: [2500], unitLoadKg: 900, unitLoadsPerLevel: 3 },
  beam: { ...SECTION, ratings: [{ spanMm: 2700, pairKg: 2400 }] },
};

test('every level check is made on a level with everything known, and each is within', () => {
  const found = audit(known);
  expect(found.findings.map(({ check }) => check)).toEqual(expect.arrayContaining([...OWN, ...BEAMS]));
  for (const one of found.findings) expect(one.verdict, one.check).toBe('within');
  expect(found.verdict).toBe('within');
  expect(found.totalKg).toBe(850);
});

test('every worked calculation can be followed by hand, with pinned and with sprung ends', () => {
  for (const connectorNmmPerRad of [null, 50e6]) {
    const found = audit({ ...known, beam: { ...known.beam, connectorNmmPerRad } });
    for (const check of [...BEAMS, 'level-total', 'unit-load', 'positions', 'tipping'] as const) expectWorked(of(found, check));
  }
});

test('worked calculations say where every number came from', () => {
  const found = audit({
    ...known,
    unitLoads: [
      goods('a', {
        goodsKg: 500,
        palletId: 'p',
        massSource: { kind: 'weighed', detail: 'scale 2', person: 'A. Fitter', date: '2026-05-03' },
      }),
    ],
    levels: [level([stand('a', 100)])],
    beam: SECTION,
  });
  const bent = of(found, 'beam-bending');
  const from = bent.worked.flatMap(({ values }) => values).map((value) => value.from);
  expect(from).toContain('weighed (scale 2), 3 May 2026, A. Fitter; with pallet Pallet p');
  expect(from).toContain('load notice LN-1; read from the load notice, 3 May 2024, A. Reader');
  expect(from).toContain('clear entry of bay A1');
});

// ---------------------------------------------------------------- front and rear

test('a front-heavy level is judged by its front beam', () => {
  // e = 200 mm of d = 1 100 − 50 mm: the front beam takes 1/2 + 200/1050 = 69.05 %
  const found = audit({
    unitLoads: [goods('a', { goodsKg: 900 })],
    levels: [level([stand('a', 950, { towardsFrontMm: 200 })])],
    notice: { levelKg: [2000], unitLoadKg: 1000 },
  });
  const share = 0.5 + 200 / 1050;
  expect(of(found, 'level-total').demand?.value).toBeCloseTo(2 * share * 900, 9);
  // 800 wide in the middle of 2 700: factor 1.7037 by moment (closed form W(2L−b)/8)
  expect(of(found, 'beam-bending').demand?.value).toBeCloseTo(2 * share * 900 * (2 - 800 / 2700), 9);
  expect(of(found, 'beam-bending').place.beam).toBe('front');
  expect(of(found, 'beam-bending').verdict).toBe('over');
  expect(plain(of(found, 'beam-bending').says)).toContain('but it bends the front beam as');
  expect(found.effects?.front).not.toBe(found.effects?.rear);
  expect(
    (found.effects?.front.resultant ?? 0) / ((found.effects?.front.resultant ?? 0) + (found.effects?.rear.resultant ?? 0)),
  ).toBeCloseTo(share, 12);
  expect(of(found, 'tipping').notes.map(plain).join(' ')).toContain('More than 55 % on one beam');
  expectWorked(of(found, 'beam-bending'));
});

test('goods that stand centrally load front and rear alike, and the frame’s depth is not needed', () => {
  const found = audit({ unitLoads: [goods('a')], levels: [level([stand('a', 950)])], frame: null });
  expect(found.effects?.rear).toBe(found.effects?.front);
  expect(of(found, 'tipping').verdict).toBe('within');
});

test('without a frame type an eccentric load leaves every beam check not assessable and names both frames', () => {
  const found = audit({ unitLoads: [goods('a')], levels: [level([stand('a', 950, { towardsFrontMm: 10 })])], frame: null });
  for (const check of ['tipping', 'level-total', 'beam-bending', 'beam-end-shear', 'beam-deflection'] as const) {
    expect(of(found, check).verdict, check).toBe('not-assessable');
    expect(of(found, check).missing.map(({ field }) => field)).toEqual(['frame:left:typeId', 'frame:right:typeId']);
  }
  expect(found.effects).toBeNull();
});

test('a light pallet under eccentric goods draws their common centre of mass towards the middle', () => {
  // 100 kg goods 150 mm in front, 50 kg pallet in the middle: 100 mm; share 1/2 + 100/1050
  const found = audit({
    pallets: [pallet('p', { massKg: 50 })],
    unitLoads: [goods('a', { goodsKg: 100, palletId: 'p', across: { kind: 'centre', towardsFrontMm: 150 } })],
    levels: [level([stand('a', 950)])],
  });
  expect(of(found, 'level-total').demand?.value).toBeCloseTo(2 * 150 * (0.5 + 100 / 1050), 9);
});

test('between unlike frames the shallower one decides', () => {
  const site = rack({ unitLoads: [goods('a')], levels: [level([stand('a', 950, { towardsFrontMm: 100 })])] });
  const frameTypes = [...site.frameTypes, { ...FRAME, id: 'shallow', depthMm: 900 }];
  const runs = site.runs.map((run) => ({
    ...run,
    frames: run.frames.map((frame, i) => (i === 1 ? { ...frame, typeId: 'shallow' } : frame)),
  }));
  const found = auditRun({ ...site, frameTypes, runs }, 'run', '2026-06-01').bays[0]?.levels[0];
  // d = 900 − 50 mm
  expect(found && of(found, 'level-total').demand?.value).toBeCloseTo(2 * 800 * (0.5 + 100 / 850), 9);
});

test('what stands on feet brings its pallet down through them', () => {
  // All of 100 + 20 kg at the middle of 2 700: 2 · 120 kg by bending
  const found = audit({
    pallets: [pallet('p', { massKg: 20 })],
    unitLoads: [goods('a', { goodsKg: 100, palletId: 'p', bearing: { kind: 'feet', feet: [{ xMm: 400, share: 1 }] } })],
    levels: [level([stand('a', 950)])],
  });
  expect(found.totalKg).toBe(120);
  expect(of(found, 'beam-bending').demand?.value).toBeCloseTo(240, 9);
});

test('a sloped pile turned left for right loads the other end, and its calculation follows', () => {
  // A triangle with its peak at the right: centre at 2/3 of 900 mm; turned round at 1/3
  const load = (mirrored: boolean) =>
    audit({
      unitLoads: [
        goods('a', { widthMm: 900, goodsKg: 600, bearing: { kind: 'sloped', slope: { by: 'heights', leftMm: 0, rightMm: 500 } } }),
      ],
      levels: [level([stand('a', 300, { mirrored })])],
    });
  expect(load(false).effects?.front.centroid).toBeCloseTo(900, 9);
  expect(load(true).effects?.front.centroid).toBeCloseTo(600, 9);
  for (const mirrored of [false, true])
    for (const check of ['beam-bending', 'beam-deflection', 'beam-end-shear'] as const) expectWorked(of(load(mirrored), check));
});

// ---------------------------------------------------------------- goods that cannot stand so

test.each<[string, Rack['levels'], CheckName, string]>([
  ['past the right end', [level([stand('a', 2000)])], 'placement', 'past the right end'],
  ['past the left end', [level([stand('a', -1)])], 'placement', 'past the left end'],
  ['in each other', [level([stand('a', 0), stand('a', 700)])], 'placement', 'stand in each other'],
  ['tipping to the front', [level([stand('a', 0, { towardsFrontMm: 600 })])], 'tipping', 'would tip'],
  ['tipping to the rear', [level([stand('a', 0, { towardsFrontMm: -600 })])], 'tipping', 'would tip'],
])('goods %s are not possible', (_, levels, check, words) => {
  const found = audit({ unitLoads: [goods('a')], levels });
  expect(found.verdict).toBe('not-possible');
  expect(found.governing?.check).toBe(check);
  expect(plain(of(found, check).says)).toContain(words);
});

test('overlapping goods still add up on the beams', () => {
  const found = audit({ unitLoads: [goods('a')], levels: [level([stand('a', 0), stand('a', 700)])] });
  expect(of(found, 'beam-bending').demand).not.toBeNull();
  expect(found.totalKg).toBe(1600);
});

test('goods that fill the level exactly stand, whatever the rounding of their measures', () => {
  // 3 × 36 in in 108 in: 914.4 + 914.4 + 914.4 is not exactly 2 743.2 in doubles
  const width = 914.4;
  const found = audit({
    unitLoads: [goods('a', { widthMm: width })],
    levels: [level([stand('a', 0), stand('a', width), stand('a', width + width)])],
    bay: { clearEntryMm: 108 * 25.4 },
  });
  expect(of(found, 'placement').verdict).toBe('within');
  // An even load is its own equivalent.
  expect(of(found, 'beam-bending').demand?.value).toBeCloseTo(2400, 6);
});

// ---------------------------------------------------------------- unknowns

const judged = ['unit-load', 'level-total', 'beam-bending', 'beam-end-shear', 'beam-deflection'] as const;

test.each<[string, Rack, string, readonly CheckName[]]>([
  ['the goods’ mass', { ...known, unitLoads: [goods('a', { goodsKg: null, palletId: 'p' }), goods('b')] }, 'unitLoad:a:goodsKg', judged],
  ['a pallet’s mass', { ...known, pallets: [pallet('p', { massKg: null })] }, 'pallet:p:massKg', judged],
  ['the unit load limit', { ...known, notice: { ...known.notice, unitLoadKg: null } }, 'notice:notice:unitLoadKg', ['unit-load']],
  [
    'the number of unit loads',
    { ...known, notice: { ...known.notice, unitLoadsPerLevel: null } },
    'notice:notice:unitLoadsPerLevel',
    ['positions'],
  ],
  [
    'the level’s rating',
    { ...known, notice: { ...known.notice, levelKg: [null] }, beam: {} },
    'notice:notice:levelKg',
    ['level-total', 'beam-bending', 'beam-end-shear', 'beam-deflection'],
  ],
  ['the notice', { ...known, notice: null }, 'bay:bay:noticeId', ['unit-load', 'positions']],
  [
    'the section modulus',
    { ...known, beam: { ...SECTION, sectionModulusMm3: null } },
    'beamType:beam:sectionModulusMm3',
    ['section-stress'],
  ],
  [
    'the design stress',
    { ...known, beam: { ...SECTION, designStressNPerMm2: null } },
    'beamType:beam:designStressNPerMm2',
    ['section-stress'],
  ],
  ['the second moment', { ...known, beam: { ...SECTION, secondMomentMm4: null } }, 'beamType:beam:secondMomentMm4', ['section-deflection']],
  [
    'the elastic modulus',
    { ...known, beam: { ...SECTION, elasticModulusNPerMm2: null } },
    'beamType:beam:elasticModulusNPerMm2',
    ['section-deflection'],
  ],
])('without %s the level is not assessable and says what to enter', (_, change, field, checks) => {
  const found = audit(change);
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
  const found = audit({ unitLoads: [goods('a', { goodsKg: null })], levels: [level([stand('a', 100)])] });
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
  expect(audit({ unitLoads: [goods('a', { goodsKg: null, bearing })], levels: [level([stand('a', 100)])] }).totalKg).toBeCloseTo(480, 9);
});

test('a shape that cannot be is not assessable and says how to mend it', () => {
  const bearing = { kind: 'stepped', columns: [{ widthMm: 300, massKg: 100 }] } as const;
  const found = audit({ unitLoads: [goods('a', { bearing })], levels: [level([stand('a', 100)])] });
  expect(found.verdict).toBe('not-assessable');
  expect(of(found, 'beam-bending').missing[0]).toMatchObject({ field: 'unitLoad:a:bearing' });
  expect(of(found, 'beam-bending').missing[0]?.how).toContain('Make the columns fill the width');
});

test('without any section data stress and sag only inform', () => {
  const found = audit({ ...known, beam: {} });
  for (const check of ['section-stress', 'section-deflection'] as const)
    expect(of(found, check)).toMatchObject({ verdict: 'not-assessable', counts: false });
  expect(found.verdict).toBe('within');
});

test('an empty level with a rating is within, and without one is not assessable', () => {
  expect(audit({ unitLoads: [], levels: [level([])] }).verdict).toBe('within');
  expect(audit({ unitLoads: [], levels: [level([])], notice: { levelKg: [] } }).verdict).toBe('not-assessable');
});

// ---------------------------------------------------------------- rating and rules

test('of the notice and the maker’s table the lower rating is used and the finding says which', () => {
  const found = audit({ ...known, notice: { ...known.notice, levelKg: [2600] }, beam: { ratings: [{ spanMm: 3000, pairKg: 2000 }] } });
  expect(found.ratedKg).toBe(2000);
  const notes = of(found, 'level-total').notes.map(plain);
  expect(notes).toContain('The lower of two ratings is used: 2000 kg by the maker’s table, 2600 kg by the notice.');
  expect(notes).toContain('The table has no row for 2700 mm: its next longer one, 3000 mm, is used.');
  expect(plain(of(found, 'level-total').says)).toContain('The maker’s table allows 2000 kg.');
});

test('a maker’s value for one beam end takes the place of the quarter that the notice proves', () => {
  // 1 600 kg, 1 000 wide at 75: left reaction 1 600 · 2 125 / 2 700 = 1 259.26 kg on two beam ends, 629.63 on one
  const load: Rack = {
    unitLoads: [goods('m', { widthMm: 1000, goodsKg: 1600 })],
    levels: [level([stand('m', 75)])],
    notice: { levelKg: [2000], unitLoadKg: 2000 },
  };
  expect(of(audit(load), 'beam-end-shear').verdict).toBe('over');
  const stated = of(audit({ ...load, beam: { endKg: 800 } }), 'beam-end-shear');
  expect(stated.verdict).toBe('within');
  expect(stated.demand?.value).toBeCloseTo((1600 * 2125) / 2700 / 2, 9);
  expect(stated.utilisation).toBeCloseTo((1600 * 2125) / 2700 / 2 / 800, 12);
  expect(plain(stated.says)).toContain('on the left end of each beam. Its maker states 800 kg for one end.');
  expectWorked(stated);
});

test('centre to centre the span is longer by half of each upright and everything bends more', () => {
  const clear = audit(known);
  const centres = audit({ ...known, rules: { span: 'centre-to-centre' } });
  expect(clear.span).toBe(2700);
  expect(centres.span).toBe(2700 + FRAME.uprightWidthMm);
  expect(of(centres, 'beam-bending').demand?.value ?? 0).toBeGreaterThan(of(clear, 'beam-bending').demand?.value ?? Infinity);
  expectWorked(of(centres, 'beam-bending'));
});

test('the rule set’s deflection limit is used and named', () => {
  const limit = (set: 'european' | 'united-states') => of(audit({ ...known, rules: { set } }), 'section-deflection');
  expect(limit('european').allowed?.value).toBe(13.5); // L/200, facts sheet F-07
  expect(limit('united-states').allowed?.value).toBe(15); // L/180
  expect(plain(limit('united-states').says)).toContain('United States rule set');
});

test('a changed value decides and says that it was changed', () => {
  const changed = [{ key: 'closeAbove', value: 0.3, reason: 'insurer' }] as const;
  expect(of(audit({ ...known, rules: { changed } }), 'level-total').verdict).toBe('close');
});

// ---------------------------------------------------------------- likely fixity

test('a verdict that changes between pinned and likely ends is close and says why', () => {
  // A point of 970 kg at mid-span: 1 940 kg pinned, (1/4 − f/8)/(1/8 − f/12) = 2.1818 at f = 0.4 → 2 116 kg of 2 000 kg
  const bearing = { kind: 'feet', feet: [{ xMm: 400, share: 1 }] } as const;
  const found = audit({
    unitLoads: [goods('a', { goodsKg: 970, bearing })],
    levels: [level([stand('a', 950)])],
    notice: { levelKg: [2200], unitLoadKg: 1200 },
  });
  const bent = of(found, 'beam-bending');
  expect(bent.utilisation).toBeCloseTo(1940 / 2200, 9);
  expect(bent.verdict).toBe('close');
  const notes = bent.notes.map(plain).join(' ');
  expect(notes).toContain('with a fixity of 0.4, which connectors may have, as 2116.36 kg (utilisation 0.961983)');
  expect(notes).toContain('The verdict changes inside this range');
});

test('over by pinned ends stays over, and the range is only shown', () => {
  const bearing = { kind: 'feet', feet: [{ xMm: 400, share: 1 }] } as const;
  const found = audit({
    unitLoads: [goods('a', { goodsKg: 1200, bearing })],
    levels: [level([stand('a', 950)])],
    notice: { levelKg: [2200], unitLoadKg: 1300 },
  });
  expect(of(found, 'beam-bending').verdict).toBe('over');
  expect(of(found, 'beam-bending').notes.map(plain).join(' ')).toContain('With pinned beam ends it counts as 2400 kg');
});

test('the shape factors of a middle point against an even load at fixity 0.1 to 0.4', () => {
  // Domain facts sheet 2.11, consequence 3 (statics, reproduced there by a script)
  const bearing = { kind: 'feet', feet: [{ xMm: 400, share: 1 }] } as const;
  for (const [fixity, factor] of [
    [0.1, '2.036'],
    [0.2, '2.077'],
    [0.3, '2.125'],
    [0.4, '2.182'],
  ] as const) {
    // k = 2·EI·f / (L·(1 − f))
    const stiffness = (2 * 927_016 * 210_000 * fixity) / (2700 * (1 - fixity));
    const found = audit({
      unitLoads: [goods('a', { goodsKg: 1000, bearing })],
      levels: [level([stand('a', 950)])],
      beam: { ...SECTION, connectorNmmPerRad: stiffness },
    });
    expect(((of(found, 'beam-bending').demand?.value ?? 0) / 1000).toFixed(3)).toBe(factor);
  }
});

// ---------------------------------------------------------------- full complement and left-out checks

const complement = (...placements: Rack['levels'][number]['placements']): Rack => ({
  unitLoads: [goods('a'), goods('heavy', { goodsKg: 830 })],
  levels: [level(placements)],
  notice: { levelKg: [2480], unitLoadKg: 850 },
});

test('a designed full complement is judged by its total as long as it is one', () => {
  // 1.037 · 2 400 = 2 488.9 kg by bending is above 2 480, and does not decide
  const whole = audit(complement(stand('a', 75), stand('a', 950), stand('a', 1825)));
  expect(whole.verdict).toBe('close');
  expect(of(whole, 'beam-bending')).toMatchObject({ verdict: 'over', counts: false });
  expectWorked(of(whole, 'full-complement'));
  const moved = audit(complement(stand('a', 75), stand('a', 980), stand('a', 1825)));
  expect(of(moved, 'beam-bending').counts).toBe(true);
  expect(moved.verdict).toBe('over');
  const heavier = audit(complement(stand('a', 75), stand('heavy', 950), stand('a', 1825)));
  expect(of(heavier, 'beam-bending').counts).toBe(true);
  expect(heavier.verdict).toBe('over');
  const missing = audit(complement(stand('a', 75), stand('a', 950)));
  expect(of(missing, 'beam-bending').counts).toBe(true);
});

test('a site can switch the full complement off, and the equivalent loads decide', () => {
  const found = audit({ ...complement(stand('a', 75), stand('a', 950), stand('a', 1825)), rules: { fullComplement: false } });
  expect(found.verdict).toBe('over');
  expect(found.governing?.check).toBe('beam-bending');
  expect(plain(of(found, 'full-complement').says)).toContain('does not judge levels as a designed full complement');
});

test.each([...OWN, ...BEAMS])('leaving out %s leaves out that check alone', (check) => {
  const found = audit({ ...known, rules: { leftOut: [{ check, reason: 'not used here' }] } });
  expect(found.findings.some((one) => one.check === check)).toBe(false);
  for (const other of [...OWN, ...BEAMS])
    if (other !== check)
      expect(
        found.findings.some((one) => one.check === other),
        other,
      ).toBe(true);
});

test('with every check left out nothing is within', () => {
  expect(audit({ ...known, rules: { leftOut: CHECKS.map((check) => ({ check, reason: 'trial' })) } }).verdict).toBe('not-assessable');
});

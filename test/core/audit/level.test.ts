import { expect, test } from 'vitest';
import { auditRun } from '../../../src-core/audit/audit';
import { CHECKS } from '../../../src-core/checks/finding';
import { plain } from '../plain';
import { expectWorked } from '../worked';
import { auditedLevel, findingOf } from './audited';
import { FRAME, goods, KNOWN, level, pallet, rack, SECTION, stand, type Rack } from './rack';

const OWN = ['placement', 'tipping', 'unit-load', 'positions', 'level-total', 'full-complement'] as const;
const BEAMS = ['beam-bending', 'beam-end-shear', 'beam-deflection', 'section-stress', 'section-deflection'] as const;

test('every level check is made on a level with everything KNOWN, and each is within', () => {
  const found = auditedLevel(KNOWN);
  expect(found.findings.map(({ check }) => check)).toEqual(expect.arrayContaining([...OWN, ...BEAMS]));
  for (const one of found.findings) expect(one.verdict, one.check).toBe('within');
  expect(found.verdict).toBe('within');
  expect(found.totalKg).toBe(850);
});

test('every worked calculation can be followed by hand, with pinned and with sprung ends', () => {
  for (const connectorNmmPerRad of [null, 50e6]) {
    const found = auditedLevel({ ...KNOWN, beam: { ...KNOWN.beam, connectorNmmPerRad } });
    for (const check of [...BEAMS, 'level-total', 'unit-load', 'positions', 'tipping'] as const) expectWorked(findingOf(found, check));
  }
});

test('worked calculations say where every number came from', () => {
  const found = auditedLevel({
    ...KNOWN,
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
  const bent = findingOf(found, 'beam-bending');
  const from = bent.worked.flatMap(({ values }) => values).map((value) => value.from);
  expect(from).toContain('weighed (scale 2), 3 May 2026, A. Fitter; with pallet Pallet p');
  expect(from).toContain('load notice LN-1; read from the load notice, 3 May 2024, A. Reader');
  expect(from).toContain('clear entry of bay A1');
});

// ---------------------------------------------------------------- front and rear

test('a front-heavy level is judged by its front beam', () => {
  // e = 200 mm of d = 1 100 − 50 mm: the front beam takes 1/2 + 200/1050 = 69.05 %
  const found = auditedLevel({
    unitLoads: [goods('a', { goodsKg: 900 })],
    levels: [level([stand('a', 950, { towardsFrontMm: 200 })])],
    notice: { levelKg: [2000], unitLoadKg: 1000 },
  });
  const share = 0.5 + 200 / 1050;
  expect(findingOf(found, 'level-total').demand?.value).toBeCloseTo(2 * share * 900, 9);
  // 800 wide in the middle of 2 700: factor 1.7037 by moment (closed form W(2L−b)/8)
  expect(findingOf(found, 'beam-bending').demand?.value).toBeCloseTo(2 * share * 900 * (2 - 800 / 2700), 9);
  expect(findingOf(found, 'beam-bending').place.beam).toBe('front');
  expect(findingOf(found, 'beam-bending').verdict).toBe('over');
  expect(plain(findingOf(found, 'beam-bending').says)).toContain('but it bends the front beam as');
  expect(found.effects?.front).not.toBe(found.effects?.rear);
  expect(
    (found.effects?.front.resultant ?? 0) / ((found.effects?.front.resultant ?? 0) + (found.effects?.rear.resultant ?? 0)),
  ).toBeCloseTo(share, 12);
  expect(findingOf(found, 'tipping').notes.map(plain).join(' ')).toContain('More than 55 % on one beam');
  expectWorked(findingOf(found, 'beam-bending'));
});

test('goods that stand centrally load front and rear alike, and the frame’s depth is not needed', () => {
  const found = auditedLevel({ unitLoads: [goods('a')], levels: [level([stand('a', 950)])], frame: null });
  expect(found.effects?.rear).toBe(found.effects?.front);
  expect(findingOf(found, 'tipping').verdict).toBe('within');
});

test('without a frame type an eccentric load leaves every beam check not assessable and names both frames', () => {
  const found = auditedLevel({ unitLoads: [goods('a')], levels: [level([stand('a', 950, { towardsFrontMm: 10 })])], frame: null });
  for (const check of ['tipping', 'level-total', 'beam-bending', 'beam-end-shear', 'beam-deflection'] as const) {
    expect(findingOf(found, check).verdict, check).toBe('not-assessable');
    expect(findingOf(found, check).missing.map(({ field }) => field)).toEqual(['frame:left:typeId', 'frame:right:typeId']);
  }
  expect(found.effects).toBeNull();
});

test('a light pallet under eccentric goods draws their common centre of mass towards the middle', () => {
  // 100 kg goods 150 mm in front, 50 kg pallet in the middle: 100 mm; share 1/2 + 100/1050
  const found = auditedLevel({
    pallets: [pallet('p', { massKg: 50 })],
    unitLoads: [goods('a', { goodsKg: 100, palletId: 'p', across: { kind: 'centre', towardsFrontMm: 150 } })],
    levels: [level([stand('a', 950)])],
  });
  expect(findingOf(found, 'level-total').demand?.value).toBeCloseTo(2 * 150 * (0.5 + 100 / 1050), 9);
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
  expect(found && findingOf(found, 'level-total').demand?.value).toBeCloseTo(2 * 800 * (0.5 + 100 / 850), 9);
});

test('what stands on feet brings its pallet down through them', () => {
  // All of 100 + 20 kg at the middle of 2 700: 2 · 120 kg by bending
  const found = auditedLevel({
    pallets: [pallet('p', { massKg: 20 })],
    unitLoads: [goods('a', { goodsKg: 100, palletId: 'p', bearing: { kind: 'feet', feet: [{ xMm: 400, share: 1 }] } })],
    levels: [level([stand('a', 950)])],
  });
  expect(found.totalKg).toBe(120);
  expect(findingOf(found, 'beam-bending').demand?.value).toBeCloseTo(240, 9);
});

test('a sloped pile turned left for right loads the other end, and its calculation follows', () => {
  // A triangle with its peak at the right: centre at 2/3 of 900 mm; turned round at 1/3
  const load = (mirrored: boolean) =>
    auditedLevel({
      unitLoads: [
        goods('a', { widthMm: 900, goodsKg: 600, bearing: { kind: 'sloped', slope: { by: 'heights', leftMm: 0, rightMm: 500 } } }),
      ],
      levels: [level([stand('a', 300, { mirrored })])],
    });
  expect(load(false).effects?.front.centroid).toBeCloseTo(900, 9);
  expect(load(true).effects?.front.centroid).toBeCloseTo(600, 9);
  for (const mirrored of [false, true])
    for (const check of ['beam-bending', 'beam-deflection', 'beam-end-shear'] as const) expectWorked(findingOf(load(mirrored), check));
});

// ---------------------------------------------------------------- rating and rules

test('of the notice and the maker’s table the lower rating is used and the finding says which', () => {
  const found = auditedLevel({
    ...KNOWN,
    notice: { ...KNOWN.notice, levelKg: [2600] },
    beam: { ratings: [{ spanMm: 3000, pairKg: 2000 }] },
  });
  expect(found.ratedKg).toBe(2000);
  const notes = findingOf(found, 'level-total').notes.map(plain);
  expect(notes).toContain('The lower of two ratings is used: 2000 kg by the maker’s table, 2600 kg by the notice.');
  expect(notes).toContain('The table has no row for 2700 mm: its next longer one, 3000 mm, is used.');
  expect(plain(findingOf(found, 'level-total').says)).toContain('The maker’s table allows 2000 kg.');
});

test('a maker’s value for one beam end takes the place of the quarter that the notice proves', () => {
  // 1 600 kg, 1 000 wide at 75: left reaction 1 600 · 2 125 / 2 700 = 1 259.26 kg on two beam ends, 629.63 on one
  const load: Rack = {
    unitLoads: [goods('m', { widthMm: 1000, goodsKg: 1600 })],
    levels: [level([stand('m', 75)])],
    notice: { levelKg: [2000], unitLoadKg: 2000 },
  };
  expect(findingOf(auditedLevel(load), 'beam-end-shear').verdict).toBe('over');
  const stated = findingOf(auditedLevel({ ...load, beam: { endKg: 800 } }), 'beam-end-shear');
  expect(stated.verdict).toBe('within');
  expect(stated.demand?.value).toBeCloseTo((1600 * 2125) / 2700 / 2, 9);
  expect(stated.utilisation).toBeCloseTo((1600 * 2125) / 2700 / 2 / 800, 12);
  expect(plain(stated.says)).toContain('on the left end of each beam. Its maker states 800 kg for one end.');
  expectWorked(stated);
});

test('centre to centre the span is longer by half of each upright and everything bends more', () => {
  const clear = auditedLevel(KNOWN);
  const centres = auditedLevel({ ...KNOWN, rules: { span: 'centre-to-centre' } });
  expect(clear.span).toBe(2700);
  expect(centres.span).toBe(2700 + FRAME.uprightWidthMm);
  expect(findingOf(centres, 'beam-bending').demand?.value ?? 0).toBeGreaterThan(findingOf(clear, 'beam-bending').demand?.value ?? Infinity);
  expectWorked(findingOf(centres, 'beam-bending'));
});

test('the rule set’s deflection limit is used and named', () => {
  const limit = (set: 'european' | 'united-states') => findingOf(auditedLevel({ ...KNOWN, rules: { set } }), 'section-deflection');
  expect(limit('european').allowed?.value).toBe(13.5); // L/200, facts sheet F-07
  expect(limit('united-states').allowed?.value).toBe(15); // L/180
  expect(plain(limit('united-states').says)).toContain('United States rule set');
});

test('a changed value decides and says that it was changed', () => {
  const changed = [{ key: 'closeAbove', value: 0.3, reason: 'insurer' }] as const;
  expect(findingOf(auditedLevel({ ...KNOWN, rules: { changed } }), 'level-total').verdict).toBe('close');
});

// ---------------------------------------------------------------- likely fixity

test('a verdict that changes between pinned and likely ends is close and says why', () => {
  // A point of 970 kg at mid-span: 1 940 kg pinned, (1/4 − f/8)/(1/8 − f/12) = 2.1818 at f = 0.4 → 2 116 kg of 2 000 kg
  const bearing = { kind: 'feet', feet: [{ xMm: 400, share: 1 }] } as const;
  const found = auditedLevel({
    unitLoads: [goods('a', { goodsKg: 970, bearing })],
    levels: [level([stand('a', 950)])],
    notice: { levelKg: [2200], unitLoadKg: 1200 },
  });
  const bent = findingOf(found, 'beam-bending');
  expect(bent.utilisation).toBeCloseTo(1940 / 2200, 9);
  expect(bent.verdict).toBe('close');
  const notes = bent.notes.map(plain).join(' ');
  expect(notes).toContain('with a fixity of 0.4, which connectors may have, as 2116.36 kg (utilisation 0.961983)');
  expect(notes).toContain('The verdict changes inside this range');
});

test('over by pinned ends stays over, and the range is only shown', () => {
  const bearing = { kind: 'feet', feet: [{ xMm: 400, share: 1 }] } as const;
  const found = auditedLevel({
    unitLoads: [goods('a', { goodsKg: 1200, bearing })],
    levels: [level([stand('a', 950)])],
    notice: { levelKg: [2200], unitLoadKg: 1300 },
  });
  expect(findingOf(found, 'beam-bending').verdict).toBe('over');
  expect(findingOf(found, 'beam-bending').notes.map(plain).join(' ')).toContain('With pinned beam ends it counts as 2400 kg');
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
    const found = auditedLevel({
      unitLoads: [goods('a', { goodsKg: 1000, bearing })],
      levels: [level([stand('a', 950)])],
      beam: { ...SECTION, connectorNmmPerRad: stiffness },
    });
    expect(((findingOf(found, 'beam-bending').demand?.value ?? 0) / 1000).toFixed(3)).toBe(factor);
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
  const whole = auditedLevel(complement(stand('a', 75), stand('a', 950), stand('a', 1825)));
  expect(whole.verdict).toBe('close');
  expect(findingOf(whole, 'beam-bending')).toMatchObject({ verdict: 'over', counts: false });
  expectWorked(findingOf(whole, 'full-complement'));
  const moved = auditedLevel(complement(stand('a', 75), stand('a', 980), stand('a', 1825)));
  expect(findingOf(moved, 'beam-bending').counts).toBe(true);
  expect(moved.verdict).toBe('over');
  const heavier = auditedLevel(complement(stand('a', 75), stand('heavy', 950), stand('a', 1825)));
  expect(findingOf(heavier, 'beam-bending').counts).toBe(true);
  expect(heavier.verdict).toBe('over');
  const missing = auditedLevel(complement(stand('a', 75), stand('a', 950)));
  expect(findingOf(missing, 'beam-bending').counts).toBe(true);
});

test('a site can switch the full complement off, and the equivalent loads decide', () => {
  const found = auditedLevel({ ...complement(stand('a', 75), stand('a', 950), stand('a', 1825)), rules: { fullComplement: false } });
  expect(found.verdict).toBe('over');
  expect(found.governing?.check).toBe('beam-bending');
  expect(plain(findingOf(found, 'full-complement').says)).toContain('does not judge levels as a designed full complement');
});

test.each([...OWN, ...BEAMS])('leaving out %s leaves out that check alone', (check) => {
  const found = auditedLevel({ ...KNOWN, rules: { leftOut: [{ check, reason: 'not used here' }] } });
  expect(found.findings.some((one) => one.check === check)).toBe(false);
  for (const other of [...OWN, ...BEAMS])
    if (other !== check)
      expect(
        found.findings.some((one) => one.check === other),
        other,
      ).toBe(true);
});

test('with every check left out nothing is within', () => {
  expect(auditedLevel({ ...KNOWN, rules: { leftOut: CHECKS.map((check) => ({ check, reason: 'trial' })) } }).verdict).toBe(
    'not-assessable',
  );
});

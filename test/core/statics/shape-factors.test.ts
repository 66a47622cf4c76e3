/**
 * Equivalent uniform load ÷ total load of common arrangements on a simply supported span, to every printed
 * digit. Source: statics, computed with a general script (the trade's facts collected for this program);
 * uniform, central, third-point and triangular loads agree with AISC Manual Table 3-23.
 */
import { expect, test } from 'vitest';
import { solveBeam } from '../../../src-core/statics/beam';
import { equivalentLoads } from '../../../src-core/statics/equivalent';
import type { BeamLoad } from '../../../src-core/statics/load';

interface Row {
  readonly name: string;
  readonly span: number;
  readonly load: BeamLoad;
  readonly factors: readonly [moment: string, shear: string, deflection: string, ofWL: string];
  /** Place over span as printed; "plateau" only says that it is a stretch. */
  readonly at: string;
}

const lines = (...list: [from: number, to: number, wFrom: number, wTo: number][]): BeamLoad => ({
  lines: list.map(([from, to, wFrom, wTo]) => ({ from, to, wFrom, wTo })),
  points: [],
});
const points = (...list: [at: number, force: number][]): BeamLoad => ({ lines: [], points: list.map(([at, force]) => ({ at, force })) });
/** Pallets of one width and mass, from their left edges. */
const pallets = (width: number, ...starts: number[]): BeamLoad =>
  lines(...starts.map((x): [number, number, number, number] => [x, x + width, 1, 1]));
/** 800 mm pallets at the three places of a full level, on lines of runners 50, 400 and 750 mm from their left edge. */
const onRunners = (...shares: [number, number, number]): BeamLoad =>
  points(...[75, 950, 1825].flatMap((x) => [50, 400, 750].map((at, i): [number, number] => [x + at, shares[i] as number])));

const L = 1200;
const rows: Row[] = [
  { name: 'uniform', span: L, load: lines([0, L, 1, 1]), factors: ['1.0000', '1.0000', '1.0000', '0.12500'], at: '0.500' },
  { name: 'point at middle', span: L, load: points([L / 2, 1]), factors: ['2.0000', '1.0000', '1.6000', '0.25000'], at: '0.500' },
  { name: 'point at quarter', span: L, load: points([L / 4, 1]), factors: ['1.5000', '1.5000', '1.1180', '0.18750'], at: '0.250' },
  {
    name: 'two equal points at thirds',
    span: L,
    load: points([L / 3, 1], [(2 * L) / 3, 1]),
    factors: ['1.3333', '1.0000', '1.3630', '0.16667'],
    at: '0.333–0.667',
  },
  {
    name: 'two equal points at quarters',
    span: L,
    load: points([L / 4, 1], [(3 * L) / 4, 1]),
    factors: ['1.0000', '1.0000', '1.1000', '0.12500'],
    at: '0.250–0.750',
  },
  {
    name: 'triangle, greatest at the right end',
    span: L,
    load: lines([0, L, 0, 1]),
    factors: ['1.0264', '1.3333', '1.0018', '0.12830'],
    at: '0.5774',
  },
  { name: 'trapezoid 1 : 3', span: L, load: lines([0, L, 1, 3]), factors: ['1.0069', '1.1667', '1.0005', '0.12586'], at: '0.5408' },
  {
    name: 'symmetric triangle, peak in the middle',
    span: L,
    load: lines([0, L / 2, 0, 1], [L / 2, L, 1, 0]),
    factors: ['1.3333', '1.0000', '1.2800', '0.16667'],
    at: '0.500',
  },
  {
    name: 'uniform on left half only',
    span: L,
    load: lines([0, L / 2, 1, 1]),
    factors: ['1.1250', '1.5000', '1.0081', '0.14063'],
    at: '0.375',
  },
  {
    name: 'uniform on middle half',
    span: L,
    load: lines([L / 4, (3 * L) / 4, 1, 1]),
    factors: ['1.5000', '1.0000', '1.4250', '0.18750'],
    at: '0.500',
  },
  {
    name: 'uniform on middle third',
    span: L,
    load: lines([L / 3, (2 * L) / 3, 1, 1]),
    factors: ['1.6667', '1.0000', '1.5185', '0.20833'],
    at: '0.500',
  },
  {
    name: 'uniform on the two outer thirds',
    span: L,
    load: lines([0, L / 3, 1, 1], [(2 * L) / 3, L, 1, 1]),
    factors: ['0.6667', '1.0000', '0.7407', '0.08333'],
    at: '0.333–0.667',
  },
  {
    name: '3 × 800 in 2700, 75 gaps',
    span: 2700,
    load: pallets(800, 75, 950, 1825),
    factors: ['1.0370', '1.0000', '1.0349', '0.12963'],
    at: '0.500',
  },
  {
    name: 'the same, each on 3 runners ¼–½–¼',
    span: 2700,
    load: onRunners(1, 2, 1),
    factors: ['1.0494', '1.0000', '1.0296', '0.13117'],
    at: '0.500',
  },
  {
    name: 'the same, each on 3 runners ⅓ each',
    span: 2700,
    load: onRunners(1, 1, 1),
    factors: ['1.0206', '1.0000', '1.0151', '0.12757'],
    at: '0.500',
  },
  {
    name: '2 × 1200 in 2700, 100 gaps',
    span: 2700,
    load: pallets(1200, 100, 1400),
    factors: ['1.0370', '1.0000', '1.0510', '0.12963'],
    at: 'plateau',
  },
  {
    name: '2 × 1000 in 2300, 100 gaps',
    span: 2300,
    load: pallets(1000, 100, 1200),
    factors: ['1.0435', '1.0000', '1.0597', '0.13043'],
    at: 'plateau',
  },
  {
    name: '4 × 800 in 3600, 80 gaps',
    span: 3600,
    load: pallets(800, 80, 960, 1840, 2720),
    factors: ['1.0222', '1.0000', '1.0264', '0.12778'],
    at: 'plateau',
  },
  {
    name: '2 × 600 in 2700, end gaps 700, middle 100',
    span: 2700,
    load: pallets(600, 700, 1400),
    factors: ['1.4815', '1.0000', '1.4234', '0.18519'],
    at: 'plateau',
  },
  {
    name: '1 × 800 centred in 2700',
    span: 2700,
    load: pallets(800, 950),
    factors: ['1.7037', '1.0000', '1.5350', '0.21296'],
    at: '0.500',
  },
  {
    name: '1 × 1000 centred in 2700',
    span: 2700,
    load: pallets(1000, 850),
    factors: ['1.6296', '1.0000', '1.5004', '0.20370'],
    at: '0.500',
  },
  {
    name: '1 × 1200 centred in 2700',
    span: 2700,
    load: pallets(1200, 750),
    factors: ['1.5556', '1.0000', '1.4595', '0.19444'],
    at: '0.500',
  },
];

test.each(rows.map((row) => [row.name, row] as const))('%s', (_, { span, load, factors, at }) => {
  const rigidity = 1e11;
  const answer = solveBeam({ span, rigidity, left: { kind: 'pinned' }, right: { kind: 'pinned' } }, load);
  const even = equivalentLoads(answer, rigidity);
  const total = even.total;
  // A value whose last printed digit is a rounded half (0.140625) must not fall to a rounding of 1e-16.
  const digits = (value: number, count: number): string => (value * (1 + 1e-13)).toFixed(count);
  expect([
    digits(even.bending / total, 4),
    digits(even.endShear / total, 4),
    digits(even.deflection / total, 4),
    digits(answer.sagging.moment / (total * span), 5),
  ]).toEqual(factors);
  const { from, to } = answer.sagging;
  if (at === 'plateau') {
    // The level stretch is the middle gap.
    expect(to).toBeGreaterThan(from);
    expect(from + to).toBe(span);
    return;
  }
  const printed = at.split('–');
  const count = (printed[0] ?? '').length - 2;
  expect([...new Set([from, to])].map((x) => digits(x / span, count))).toEqual(printed);
});

test.each([
  [0, '2.000'],
  [0.1, '2.036'],
  [0.2, '2.077'],
  [0.3, '2.125'],
  [0.4, '2.182'],
  [1, '3.000'],
])('sagging of a central point load over that of the same uniform load, at a fixity of %d of both ends: %s', (fixity, ratio) => {
  const span = 2700;
  const rigidity = 2e11;
  const end = { kind: 'sprung', stiffness: (2 * rigidity * fixity) / (span * (1 - fixity)) } as const;
  const sagging = (load: BeamLoad): number => solveBeam({ span, rigidity, left: end, right: end }, load).sagging.moment;
  expect((sagging(points([span / 2, span])) / sagging(lines([0, span, 1, 1]))).toFixed(3)).toBe(ratio);
});

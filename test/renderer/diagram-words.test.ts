import { expect, test } from 'vitest';
import type { Reading } from '../../src-core/units/format';
import type { Diagram, Peak } from '../../src-renderer/drawing/diagram';
import { diagramSentence, peakLabel, placeWords } from '../../src-renderer/drawing/diagram-words';

const reading: Reading = { units: 'metric', locale: 'en-GB' };
/** Spaces of every width as plain ones. */
const plain = (text: string) => text.replace(/[\u00a0\u202f]/g, ' ');

const bending = (change: Partial<Diagram>, peak: Partial<Peak> = {}): Diagram => ({
  name: 'bending',
  plot: { curves: [], span: 2700, least: 0, most: 1, downwards: false },
  // 405 kg·m in the core's kg·mm
  peaks: [{ beam: 'front', value: 405_000, from: 1350, to: 1350, ...peak }],
  limits: [{ kind: 'even load', value: 337_500, exceeded: true, judged: true }],
  worstCase: null,
  measured: true,
  ...change,
});

test('a diagram says its greatest value, its place and how it stands to its limit', () => {
  expect(plain(diagramSentence(bending({}), reading, 200))).toBe(
    'Bending of the front beam: greatest 405 kg·m at 1 350 mm; beyond rated even load 338 kg·m.',
  );
});

test('a limit that the verdict is not made by is told as information', () => {
  const limits = [{ kind: 'even load', value: 337_500, exceeded: true, judged: false }] as const;
  expect(plain(diagramSentence(bending({ limits }), reading, 200))).toContain('beyond rated even load 338 kg·m, for information');
});

test('the worst case of placement and mass stands behind what is stated', () => {
  const worstCase = { beam: 'front', value: 450_000, from: 1300, to: 1300 } as const;
  expect(plain(diagramSentence(bending({ worstCase }), reading, 200))).toBe(
    'Bending of the front beam: greatest 405 kg·m at 1 350 mm; beyond rated even load 338 kg·m; worst case front 450 kg·m at 1 300 mm.',
  );
});

test('without the beam’s section deflection is told as a ratio, never in millimetres', () => {
  const deflection = bending({ name: 'deflection', measured: false }, { value: 3 });
  const sentence = plain(
    diagramSentence({ ...deflection, limits: [{ kind: 'even load', value: 2, exceeded: true, judged: true }] }, reading, 200),
  );
  expect(sentence).toContain('shape only');
  expect(sentence).toContain('1.5 times that under the rating evenly spread');
  expect(sentence).not.toContain('3 mm');
});

test('an empty level says that there is no load', () => {
  expect(diagramSentence(bending({ peaks: [] }), reading, 200)).toBe('Bending: no load.');
});

test.each([
  [{ from: 1382, to: 1382 }, 'at 1 382 mm'],
  [{ from: 0, to: 0 }, 'at the left support'],
  [{ from: 2700, to: 2700 }, 'at the right support'],
  [{ from: 1200, to: 1500 }, 'between 1 200 mm and 1 500 mm'],
])('the place %o reads "%s"', (place, words) => {
  expect(plain(placeWords(place, 2700, reading))).toBe(words);
});

test('the label at the peak names the beam where beams are told apart', () => {
  expect(plain(peakLabel(bending({}), { beam: 'front', value: 405_000, from: 1350, to: 1350 }, reading))).toBe(
    'front 405 kg·m at 1 350 mm',
  );
  expect(plain(peakLabel(bending({}), { beam: 'pair', value: 405_000, from: 1350, to: 1350 }, reading))).toBe('405 kg·m at 1 350 mm');
});

import { expect, test } from 'vitest';
import { joinChains } from '../../../src-core/package/chains';

/** Hashes as they stand in chains: each stands for all records up to it. */
const chain = (text: string): string[] => [...text].map((_, i) => text.slice(0, i + 1));

test('a chain that goes on where ours ends continues it', () => {
  expect(joinChains([chain('ab')], [chain('abcd')])).toEqual([{ kind: 'continues', at: 0, from: 2 }]);
  expect(joinChains([[]], [chain('ab')])).toEqual([{ kind: 'continues', at: 0, from: 0 }]);
  expect(joinChains([], [chain('ab')])).toEqual([{ kind: 'continues', at: 0, from: 0 }]);
});

test('a chain that ours goes on from, or the same one, is here', () => {
  expect(joinChains([chain('abcd')], [chain('ab'), chain('abcd'), []])).toEqual([{ kind: 'here' }, { kind: 'here' }, { kind: 'here' }]);
});

test('where both went on, theirs is kept apart, from the last record that both have', () => {
  expect(joinChains([chain('abx')], [chain('abyz')])).toEqual([{ kind: 'apart', at: 1, from: 2 }]);
  expect(joinChains([chain('x')], [chain('y')])).toEqual([{ kind: 'apart', at: 1, from: 0 }]);
});

test('a chain that is kept apart already is continued there, whichever of theirs it is', () => {
  const ours = [chain('abx'), chain('aby')];
  expect(joinChains(ours, [chain('abyz')])).toEqual([{ kind: 'continues', at: 1, from: 3 }]);
  expect(joinChains(ours, [chain('aby'), chain('abx')])).toEqual([{ kind: 'here' }, { kind: 'here' }]);
  // Their own chain and one that they keep apart meet ours the other way round.
  expect(joinChains([chain('abx')], [chain('aby'), chain('abx')])).toEqual([{ kind: 'apart', at: 1, from: 2 }, { kind: 'here' }]);
});

test('a fork of a fork is kept apart from its own first record', () => {
  expect(joinChains([chain('abx'), chain('abyy')], [chain('abyz')])).toEqual([{ kind: 'apart', at: 2, from: 3 }]);
});

import fc from 'fast-check';
import { expect, test } from 'vitest';
import { amend, record, redo, startHistory, undo, type UndoHistory } from '../../src-renderer/state/undo-history';

/** Values are objects, because the program tells states apart by identity. */
const value = (n: number) => ({ n });
type Value = ReturnType<typeof value>;

test('undoing everything gives back the first value itself, redoing everything the last', () => {
  fc.assert(
    fc.property(fc.array(fc.nat(), { minLength: 1, maxLength: 700 }), (numbers) => {
      const first = value(-1);
      let history: UndoHistory<Value> = startHistory(first);
      for (const n of numbers) history = record(history, `edit ${n}`, value(n));
      const last = history.value;
      while (history.past.length > 0) history = undo(history);
      expect(history.value).toBe(first);
      expect(history.future.map((step) => step.name)).toEqual(numbers.map((n) => `edit ${n}`));
      while (history.future.length > 0) history = redo(history);
      expect(history.value).toBe(last);
    }),
    { numRuns: 100 },
  );
});

test('random walks of editing, undoing and redoing agree with a plain list of states', () => {
  const action = fc.oneof(fc.constant('undo' as const), fc.constant('redo' as const), fc.nat());
  fc.assert(
    fc.property(fc.array(action, { maxLength: 300 }), (actions) => {
      let history = startHistory(value(-1));
      let states = [history.value];
      let at = 0;
      for (const one of actions) {
        if (one === 'undo') {
          history = undo(history);
          at = Math.max(0, at - 1);
        } else if (one === 'redo') {
          history = redo(history);
          at = Math.min(states.length - 1, at + 1);
        } else {
          const next = value(one);
          history = record(history, String(one), next);
          states = [...states.slice(0, at + 1), next];
          at += 1;
        }
        expect(history.value).toBe(states[at]);
        expect(history.past).toHaveLength(at);
        expect(history.future).toHaveLength(states.length - 1 - at);
      }
    }),
    { numRuns: 1000 },
  );
});

test('an edit that changes nothing is no step', () => {
  const history = startHistory(value(1));
  expect(record(history, 'nothing', history.value)).toBe(history);
});

test('a row of nudges is taken back as one step, to where it began', () => {
  const first = value(0);
  let history = record(startHistory(first), 'Move', value(1));
  history = amend(amend(history, value(2)), value(3));
  expect(history.value.n).toBe(3);
  expect(undo(history).value).toBe(first);
  expect(redo(undo(history)).value.n).toBe(3);
});

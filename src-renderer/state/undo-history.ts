/**
 * The line of values that editing made: what came before, what stands, what was undone. Every value
 * is kept as it was, so undo and redo are exact, and nothing limits the number of steps.
 */
export interface Step<T> {
  /** The edit's name in words: "Move Flour, bagged". */
  readonly name: string;
  /** The value on the other side of the edit: before it in `past`, after it in `future`. */
  readonly value: T;
}

export interface UndoHistory<T> {
  readonly past: readonly Step<T>[];
  readonly value: T;
  readonly future: readonly Step<T>[];
}

export const startHistory = <T>(value: T): UndoHistory<T> => ({ past: [], value, future: [] });

/** An edit that changes nothing is not a step. */
export function record<T>(history: UndoHistory<T>, name: string, value: T): UndoHistory<T> {
  if (value === history.value) return history;
  return { past: [...history.past, { name, value: history.value }], value, future: [] };
}

/** The newest step takes this value in as well, so that a row of nudges is undone as one. */
export function amend<T>(history: UndoHistory<T>, value: T): UndoHistory<T> {
  return history.past.length === 0 ? history : { past: history.past, value, future: [] };
}

export function undo<T>(history: UndoHistory<T>): UndoHistory<T> {
  const step = history.past.at(-1);
  if (step === undefined) return history;
  return { past: history.past.slice(0, -1), value: step.value, future: [{ name: step.name, value: history.value }, ...history.future] };
}

export function redo<T>(history: UndoHistory<T>): UndoHistory<T> {
  const step = history.future[0];
  if (step === undefined) return history;
  return { past: [...history.past, { name: step.name, value: history.value }], value: step.value, future: history.future.slice(1) };
}

/** The beam of the handbook tests, and what a row of the handbook gives. */
import { expect } from 'vitest';
import { solveBeam, type BeamAnswer, type BeamEnd } from '../../../src-core/statics/beam';
import type { LineLoad, PointLoad } from '../../../src-core/statics/load';
import { deflectionIn, momentIn, rotationIn } from '../../../src-core/statics/segment';
import { expectClose } from '../../close';

export const L = 2730;
export const EI = 2.37e11;
export const w = 4.3;
export const P = 5170;
export const PINNED: BeamEnd = { kind: 'pinned' };
export const FIXED: BeamEnd = { kind: 'fixed' };
export const sprung = (stiffness: number): BeamEnd => ({ kind: 'sprung', stiffness });

export const line = (from: number, to: number, wFrom: number, wTo = wFrom): LineLoad => ({ from, to, wFrom, wTo });
export const point = (at: number, force = P): PointLoad => ({ at, force });
export const solve = (left: BeamEnd, right: BeamEnd, lines: LineLoad[], points: PointLoad[] = []): BeamAnswer =>
  solveBeam({ span: L, rigidity: EI, left, right }, { lines, points });
export const simple = (lines: LineLoad[], points: PointLoad[] = []): BeamAnswer => solve(PINNED, PINNED, lines, points);

interface Expected {
  R1?: number;
  R2?: number;
  /** Greatest sagging moment and its place. */
  M?: number;
  x?: number;
  M1?: number;
  M2?: number;
  d?: number;
  xd?: number;
}

export function check(answer: BeamAnswer, expected: Expected): void {
  const got: Required<Expected> = {
    R1: answer.reactionLeft,
    R2: answer.reactionRight,
    M: answer.sagging.moment,
    x: answer.sagging.from,
    M1: answer.endMomentLeft,
    M2: answer.endMomentRight,
    d: answer.deflection.sag,
    xd: answer.deflection.at,
  };
  for (const [key, value] of Object.entries(expected) as [keyof Expected, number][]) expectClose(got[key], value, 1e-13, undefined, key);
}

/** State at x from the segment that holds it. */
export function at(answer: BeamAnswer, x: number): { moment: number; deflection: number; rotation: number } {
  const segment = answer.segments.findLast((one) => one.from <= x) ?? expect.fail('no segment');
  const s = x - segment.from;
  return { moment: momentIn(segment, s), deflection: deflectionIn(segment, s, EI), rotation: rotationIn(segment, s, EI) };
}

/** A printed decimal is right to half of its last digit. */
export const printed = (actual: number, value: number, digits: number): void => expectClose(actual, value, 0.5 * 10 ** -digits, 1);

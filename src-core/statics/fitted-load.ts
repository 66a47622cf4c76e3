import type { BeamLoad } from './load';

/** Sums such as position + width round; a load past an end by less than this part of the span stands on the end. */
const ROUNDING = 1e-12;

/**
 * The load with places a rounding past the supports put on them, stopped if no beam of this span can carry it.
 * @throws RangeError quoting the value: outside 0…span, not a number, upward, or a piece without length
 */
export function fittedLoad(load: BeamLoad, span: number): BeamLoad {
  const slack = span * ROUNDING;
  let inside = true;
  for (const { at, force } of load.points) {
    if (!(at >= -slack && at <= span + slack)) throw new RangeError(`a point load must stand between 0 and the span of ${span} mm, got ${at}`);
    if (!(force >= 0 && force < Infinity)) throw new RangeError(`a point load must be 0 N or more, got ${force}`);
    inside &&= at >= 0 && at <= span;
  }
  for (const { from, to, wFrom, wTo } of load.lines) {
    if (!(from >= -slack && to <= span + slack))
      throw new RangeError(`a line load must lie between 0 and the span of ${span} mm, got ${from} to ${to}`);
    if (!(from < to)) throw new RangeError(`a line load must end right of where it begins, got ${from} to ${to} mm`);
    if (!(wFrom >= 0 && wTo >= 0 && wFrom < Infinity && wTo < Infinity))
      throw new RangeError(`load intensity must be 0 N/mm or more, got ${wFrom} to ${wTo}`);
    inside &&= from >= 0 && to <= span;
  }
  if (inside) return load;
  const clamp = (x: number) => Math.min(Math.max(x, 0), span);
  return {
    lines: load.lines.map((line) => ({ ...line, from: clamp(line.from), to: clamp(line.to) })).filter(({ from, to }) => from < to),
    points: load.points.map((point) => ({ ...point, at: clamp(point.at) })),
  };
}

import type { BeamLoad } from './load';

/**
 * Stops a load that no beam of this span can carry.
 * @throws RangeError quoting the value: outside 0…span, not a number, upward, or a piece without length
 */
export function checkLoad(load: BeamLoad, span: number): void {
  for (const { at, force } of load.points) {
    if (!(at >= 0 && at <= span)) throw new RangeError(`a point load must stand between 0 and the span of ${span} mm, got ${at}`);
    if (!(force >= 0 && force < Infinity)) throw new RangeError(`a point load must be 0 N or more, got ${force}`);
  }
  for (const { from, to, wFrom, wTo } of load.lines) {
    if (!(from >= 0 && to <= span)) throw new RangeError(`a line load must lie between 0 and the span of ${span} mm, got ${from} to ${to}`);
    if (!(from < to)) throw new RangeError(`a line load must end right of where it begins, got ${from} to ${to} mm`);
    if (!(wFrom >= 0 && wTo >= 0 && wFrom < Infinity && wTo < Infinity))
      throw new RangeError(`load intensity must be 0 N/mm or more, got ${wFrom} to ${wTo}`);
  }
}

/** SVG path data from points. Numbers are rounded to a hundredth of a pixel. */
import type { Point } from './outline';

const round = (value: number): string => String(Math.round(value * 100) / 100);

/** `M x y L x y …`, closed on request; empty for no points. */
export function pathThrough(points: readonly Point[], closed = false): string {
  if (points.length === 0) return '';
  const steps = points.map(({ x, y }, i) => `${i === 0 ? 'M' : 'L'}${round(x)} ${round(y)}`);
  return steps.join('') + (closed ? 'Z' : '');
}

/** Several closed polygons as one path. */
export function pathOf(polygons: readonly (readonly Point[])[]): string {
  return polygons.map((polygon) => pathThrough(polygon, true)).join('');
}

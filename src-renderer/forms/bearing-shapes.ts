/** A first state of each bearing shape when it is chosen, keeping what the goods already say. */
import type { BearingShape, DepthShape, Slope } from '../../src-core/site/site';

/** Shown under a shape whose numbers nobody has changed. */
export const PROPOSED = 'These numbers are only proposed. Change them to how it really stands.';
/** A share of a mass that is not known would be taken for a mass of zero. */
export const NEEDS_MASS = 'Type the mass of the goods first: it is what these numbers start from.';

/** Whether a shape with numbers is still as it was proposed when it was chosen. */
export const isProposed = (shape: BearingShape | DepthShape, fresh: BearingShape | DepthShape): boolean =>
  shape.kind !== 'even' && JSON.stringify(shape) === JSON.stringify(fresh);

export function freshBearing(kind: BearingShape['kind'], widthMm: number, goodsKg: number | null): BearingShape {
  switch (kind) {
    case 'even':
      return { kind };
    case 'stepped': {
      const left = Math.round(widthMm / 2);
      const half = Math.round((goodsKg ?? 0) / 2);
      return {
        kind,
        columns: [
          { widthMm: left, massKg: half },
          { widthMm: widthMm - left, massKg: (goodsKg ?? 0) - half },
        ],
      };
    }
    case 'sloped':
      return { kind, slope: { by: 'ratio', rightOverLeft: 2 } };
    case 'profile':
      return {
        kind,
        points: [
          { xMm: 0, heightMm: 500 },
          { xMm: widthMm, heightMm: 1000 },
        ],
        densityKgPerM3: null,
      };
    case 'bearers':
      return {
        kind,
        bearers: [
          { centreMm: 50, widthMm: 100, share: null },
          { centreMm: widthMm - 50, widthMm: 100, share: null },
        ],
      };
    case 'feet':
      return {
        kind,
        feet: [
          { xMm: 50, share: null },
          { xMm: widthMm - 50, share: null },
        ],
      };
  }
}

export function freshSlope(by: Slope['by'], widthMm: number, goodsKg: number | null): Slope {
  const mean = widthMm > 0 ? Math.round((1000 * (goodsKg ?? 0)) / widthMm) : 0;
  switch (by) {
    case 'intensities':
      return { by, leftKgPerM: mean, rightKgPerM: mean };
    case 'heights':
      return { by, leftMm: 500, rightMm: 1000 };
    case 'ratio':
      return { by, rightOverLeft: 2 };
    case 'end-and-slope':
      return { by, end: 'left', endKgPerM: mean, changeKgPerM2: 0 };
  }
}

export function freshAcross(kind: DepthShape['kind'], depthMm: number, goodsKg: number | null): DepthShape {
  switch (kind) {
    case 'even':
      return { kind };
    case 'stepped': {
      const front = Math.round(depthMm / 2);
      const half = Math.round((goodsKg ?? 0) / 2);
      return {
        kind,
        columns: [
          { depthMm: front, massKg: half },
          { depthMm: depthMm - front, massKg: (goodsKg ?? 0) - half },
        ],
      };
    }
    case 'sloped':
      return { kind, rearOverFront: 1 };
    case 'centre':
      return { kind, towardsFrontMm: 0 };
  }
}

/** Whether the shape itself says how heavy the goods are. */
export function findsItsMass(bearing: BearingShape): boolean {
  if (bearing.kind === 'profile') return bearing.densityKgPerM3 !== null;
  if (bearing.kind === 'stepped') return bearing.columns.every((column) => 'densityKgPerM3' in column);
  return bearing.kind === 'sloped' && (bearing.slope.by === 'intensities' || bearing.slope.by === 'end-and-slope');
}

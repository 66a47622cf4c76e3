/**
 * How goods stand, as people state it; part of the site model and its file. Lengths in mm, masses in
 * kg, intensities in kg per m of beam, as the names say.
 */

/** Along the beam, x from the unit load's left edge. */
export type BearingShape =
  | { readonly kind: 'even' }
  /** Columns from left to right; their widths fill the unit load's width. */
  | { readonly kind: 'stepped'; readonly columns: readonly SteppedColumn[] }
  | { readonly kind: 'sloped'; readonly slope: Slope }
  /** Polyline of the pile's top, x ascending from 0 to the width. Mass scales it, or a density finds the mass. */
  | {
      readonly kind: 'profile';
      readonly points: readonly { readonly xMm: number; readonly heightMm: number }[];
      readonly densityKgPerM3: number | null;
    }
  /** Bearers front to back; all shares null = shared by statics of the goods above. */
  | {
      readonly kind: 'bearers';
      readonly bearers: readonly { readonly centreMm: number; readonly widthMm: number; readonly share: number | null }[];
    }
  | { readonly kind: 'feet'; readonly feet: readonly { readonly xMm: number; readonly share: number | null }[] };

/** A column is given by its mass, or by height and density; never both. */
export type SteppedColumn =
  | { readonly widthMm: number; readonly massKg: number }
  | { readonly widthMm: number; readonly heightMm: number; readonly densityKgPerM3: number };

/** A sloping pile, in the four ways people state it. */
export type Slope =
  | { readonly by: 'intensities'; readonly leftKgPerM: number; readonly rightKgPerM: number }
  | { readonly by: 'heights'; readonly leftMm: number; readonly rightMm: number }
  /** Right intensity over left. */
  | { readonly by: 'ratio'; readonly rightOverLeft: number }
  /** One end's intensity and how much it changes per m towards the other end. */
  | { readonly by: 'end-and-slope'; readonly end: 'left' | 'right'; readonly endKgPerM: number; readonly changeKgPerM2: number };

/** How the goods' mass lies across the depth, y from the front edge; the same pieces as along the beam. */
export type DepthShape =
  | { readonly kind: 'even' }
  | { readonly kind: 'stepped'; readonly columns: readonly { readonly depthMm: number; readonly massKg: number }[] }
  | { readonly kind: 'sloped'; readonly rearOverFront: number }
  /** Centre of mass stated: distance in front of the middle (towards the aisle). */
  | { readonly kind: 'centre'; readonly towardsFrontMm: number };

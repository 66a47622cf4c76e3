/** How a beam's ends are held, and what that does to the moment at each of them. */

/** `stiffness` in N·mm/rad, 0 or more: 0 is the same as pinned, Infinity the same as fixed. */
export type BeamEnd = { readonly kind: 'pinned' } | { readonly kind: 'fixed' } | { readonly kind: 'sprung'; readonly stiffness: number };

/**
 * The hogging moment at the left end is `(near·∫w·a·b² + far·∫w·a²·b) / L²` with a and b the distances
 * of each bit of load from the left and the right support; `rest` is 1 − near and `lead` near − far,
 * both kept apart because subtracting would lose their digits. The same for the right end with a and b
 * exchanged.
 */
export interface EndCoefficients {
  readonly near: number;
  readonly far: number;
  readonly rest: number;
  readonly lead: number;
}

export interface HeldEnds {
  readonly left: EndCoefficients;
  readonly right: EndCoefficients;
}

/**
 * From compatibility: the pinned beam's end slopes, with the end moments acting, equal the springs'
 * rotations M/k. The two equations are solved once, by the fixity factor g = 1 / (1 + 3EI/kL) of each end.
 * Source: Monforton and Wu 1963 (fixity factor), from memory; the handbook cases test it.
 * @throws RangeError if a stiffness is negative or not a number
 */
export function heldEnds(left: BeamEnd, right: BeamEnd, rigidity: number, span: number): HeldEnds {
  const atLeft = fixityOf(left, rigidity, span);
  const atRight = fixityOf(right, rigidity, span);
  return { left: coefficients(atLeft, atRight), right: coefficients(atRight, atLeft) };
}

interface Fixity {
  readonly g: number;
  /** 1 − g */
  readonly free: number;
}

function fixityOf(end: BeamEnd, rigidity: number, span: number): Fixity {
  if (end.kind === 'pinned') return { g: 0, free: 1 };
  if (end.kind === 'fixed') return { g: 1, free: 0 };
  const { stiffness } = end;
  if (!(stiffness >= 0)) throw new RangeError(`stiffness of a beam end must be 0 N·mm/rad or more, got ${stiffness}`);
  // One of the two may overflow to Infinity; both quotients are then right.
  const ratio = (stiffness * span) / (3 * rigidity);
  return { g: 1 / (1 + 1 / ratio), free: 1 / (1 + ratio) };
}

function coefficients(near: Fixity, far: Fixity): EndCoefficients {
  const whole = 4 - near.g * far.g;
  return {
    near: (near.g * (4 - far.g)) / whole,
    far: (2 * near.g * far.free) / whole,
    rest: (4 * near.free) / whole,
    lead: (near.g * (2 + far.g)) / whole,
  };
}

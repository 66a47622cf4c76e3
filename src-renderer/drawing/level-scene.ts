/** The chosen level as it stands over its diagrams: x shared with them, heights as far as there is room. */
import type { LevelDrawn } from './bay-model';
import { scaleOf, type Scale } from './scale';

export interface LevelScene {
  /** px of a position in mm from the left support. */
  readonly fromSupport: Scale;
  /** px of a position in mm from the left upright's face. */
  readonly fromFace: (mm: number) => number;
  /** px per mm upwards, and how that stands to the scale along the beam (1 = the same). */
  readonly upwards: number;
  readonly flattened: number;
  /** px of the beam's top, and of the whole drawing. */
  readonly base: number;
  readonly height: number;
  /** Left support to the left upright's face, mm. */
  readonly supportToFace: number;
}

export interface SceneSheet {
  readonly width: number;
  readonly inset: number;
  /** px over the beam that may be used. */
  readonly tallest: number;
  /** px under the beam's top, for supports and reactions. */
  readonly below: number;
}

/** The beam between its supports, mm; where the frames' types are not known the clear entry stands for it. */
export interface Supports {
  readonly span: number;
  readonly supportToFace: number;
}

export function levelScene(level: LevelDrawn, { span, supportToFace }: Supports, { width, inset, tallest, below }: SceneSheet): LevelScene {
  const fromSupport = scaleOf(0, span, inset, width - inset);
  const along = (width - 2 * inset) / span;
  const highest = Math.max(300, ...level.goods.map((goods) => goods.outline.height));
  const upwards = Math.min(along, tallest / highest);
  const base = highest * upwards + 14;
  return {
    fromSupport,
    fromFace: (mm) => fromSupport(supportToFace + mm),
    upwards,
    flattened: upwards / along,
    base,
    height: base + below,
    supportToFace,
  };
}

/**
 * Sizes that an entry of a library cannot be without: it is made only when they have been typed, so that
 * no usual size stands in a site as if somebody had measured it. Everything else starts as not known.
 */
import type { LibraryItem, LibraryKind } from './library-items';

export interface NeededSize {
  readonly key: string;
  readonly label: string;
}

/** Sizes not typed yet are null. */
export type Unsized<T, K extends keyof T> = Omit<T, K> & { readonly [Size in K]: T[Size] | null };

export type UnitLoadDraft = Unsized<LibraryItem['unitLoad'], 'widthMm' | 'depthMm' | 'heightMm'>;

export const NEEDED_SIZES: Readonly<Record<LibraryKind, readonly NeededSize[]>> = {
  unitLoad: [
    { key: 'widthMm', label: 'Width along the beam' },
    { key: 'depthMm', label: 'Depth' },
    { key: 'heightMm', label: 'Height with pallet' },
  ],
  pallet: [
    { key: 'lengthMm', label: 'Longer side' },
    { key: 'widthMm', label: 'Shorter side' },
    { key: 'heightMm', label: 'Height' },
  ],
  beamType: [
    { key: 'heightMm', label: 'Height of the section' },
    { key: 'widthMm', label: 'Width of the section' },
  ],
  frameType: [
    { key: 'depthMm', label: 'Depth, outside to outside' },
    { key: 'uprightWidthMm', label: 'Width of an upright' },
  ],
  notice: [],
  floor: [],
  bayTemplate: [],
};

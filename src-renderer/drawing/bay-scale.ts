/** Where the millimetres of a bay fall in its drawing: one scale both ways. */
import type { BayDrawn, LevelDrawn } from './bay-model';
import { clamp } from './scale';

export interface BayScale {
  /** px per mm. */
  readonly rate: number;
  readonly width: number;
  readonly height: number;
  /** px of a position in mm from the left upright's face, and of a height above the floor. */
  readonly x: (mm: number) => number;
  readonly y: (mm: number) => number;
  readonly mmAt: (px: number) => number;
}

export interface BaySheet {
  /** px that are there, and the most that may be taken upwards. */
  readonly width: number;
  readonly tallest: number;
  /** Free edges for what is written round the drawing. */
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
}

export function bayScale(bay: BayDrawn, sheet: BaySheet): BayScale {
  const across = bay.entry + bay.leftUpright.width + bay.rightUpright.width;
  const free = Math.max(40, sheet.width - sheet.left - sheet.right);
  const rate = Math.min(free / across, sheet.tallest / bay.height);
  const face = sheet.left + bay.leftUpright.width * rate;
  const floor = sheet.top + bay.height * rate;
  return {
    rate,
    width: sheet.left + across * rate + sheet.right,
    height: floor + sheet.bottom,
    x: (mm) => face + mm * rate,
    y: (mm) => floor - mm * rate,
    mmAt: (px) => (px - face) / rate,
  };
}

/** Top and bottom of the band that belongs to a level, px: from its beam up to the next. */
export function bandOf(level: LevelDrawn, { y }: BayScale): { readonly top: number; readonly bottom: number } {
  return { top: y(level.height + level.room), bottom: y(level.height - level.beamHeight) };
}

/** The level whose band holds this height, else the nearest. */
export function levelAt(bay: BayDrawn, scale: BayScale, py: number): LevelDrawn | null {
  let nearest: { level: LevelDrawn; away: number } | null = null;
  for (const level of bay.levels) {
    const { top, bottom } = bandOf(level, scale);
    const away = Math.abs(py - clamp(py, top, bottom));
    if (nearest === null || away < nearest.away) nearest = { level, away };
  }
  return nearest?.level ?? null;
}

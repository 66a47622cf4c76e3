/** What is different between two states of a site, in sentences, for whoever has to choose between them. */
import { opening } from '../../src-core/checks/phrase';
import type { Bay, Id, Level, Placement, Site } from '../../src-core/site/site';
import { LIBRARIES } from '../forms/library-items';

/** Reads "from `before` to `after`". Empty where they are the same. */
export function differences(before: Site, after: Site): readonly string[] {
  const lines: string[] = [];
  if (before.name !== after.name) lines.push(`Name: ${before.name} → ${after.name}`);
  for (const [key, what] of SETTINGS) if (!same(before[key], after[key])) lines.push(`${what} changed`);
  for (const { list, item } of LIBRARIES) compareNamed<Named>(before[list], after[list], item, lines);
  compareNamed(before.runs, after.runs, 'run', lines, () => null);
  for (const run of after.runs) {
    const old = before.runs.find((one) => one.id === run.id);
    if (old === undefined || old === run) continue;
    const { frames: _f, bays: _b, ...rest } = run;
    const { frames: _of, bays: _ob, ...oldRest } = old;
    if (!same(rest, oldRest)) lines.push(`Run ${run.name}: settings changed`);
    compareNamed(old.bays, run.bays, 'bay', lines, (from, to) => bayLines(from, to, before, after));
    compareNamed(old.frames, run.frames, 'frame', lines);
    const order = run.bays.map((bay) => bay.id).filter((id) => old.bays.some((bay) => bay.id === id));
    const oldOrder = old.bays.map((bay) => bay.id).filter((id) => order.includes(id));
    if (!same(order, oldOrder)) lines.push(`Run ${run.name}: order of bays changed`);
  }
  return lines;
}

const SETTINGS: readonly (readonly [keyof Site, string])[] = [
  ['notes', 'Notes'],
  ['units', 'Units'],
  ['rules', 'Rules'],
  ['seismic', 'Earthquake answer'],
  ['outdoors', 'Wind answer'],
];

const same = (a: unknown, b: unknown): boolean => a === b || JSON.stringify(a) === JSON.stringify(b);

interface Named {
  readonly id: Id;
  readonly name: string;
}

function compareNamed<T extends Named>(
  before: readonly T[],
  after: readonly T[],
  item: string,
  lines: string[],
  inside: (from: T, to: T) => readonly string[] | null = () => [],
): void {
  const old = new Map(before.map((one) => [one.id, one]));
  const capital = opening(item);
  for (const one of after) {
    const was = old.get(one.id);
    old.delete(one.id);
    if (was === undefined) lines.push(`${capital} ${one.name} added`);
    else if (was !== one && !same(was, one)) {
      const found = inside(was, one);
      if (found === null) continue;
      lines.push(...(found.length > 0 ? found : [`${capital} ${one.name} changed`]));
    }
  }
  for (const gone of old.values()) lines.push(`${capital} ${gone.name} taken out`);
}

function bayLines(from: Bay, to: Bay, before: Site, after: Site): readonly string[] {
  const lines: string[] = [];
  if (from.name !== to.name) lines.push(`Bay ${from.name} is now called ${to.name}`);
  if (from.clearEntryMm !== to.clearEntryMm) lines.push(`Bay ${to.name}: clear entry ${from.clearEntryMm} → ${to.clearEntryMm} mm`);
  if (from.noticeId !== to.noticeId) lines.push(`Bay ${to.name}: another load notice`);
  if (from.levels.length !== to.levels.length) lines.push(`Bay ${to.name}: ${from.levels.length} → ${to.levels.length} levels`);
  for (const [i, level] of to.levels.entries()) {
    const old = from.levels.find((one) => one.id === level.id);
    if (old === undefined) continue;
    if (old.heightMm !== level.heightMm) lines.push(`Bay ${to.name}, level ${i + 1}: beam ${old.heightMm} → ${level.heightMm} mm`);
    const { placements: _p, heightMm: _h, ...rest } = level;
    const { placements: _op, heightMm: _oh, ...oldRest } = old;
    if (!same(rest, oldRest)) lines.push(`Bay ${to.name}, level ${i + 1}: beams, locks or deck changed`);
  }
  return [...lines, ...goodsLines(from, to, before, after)];
}

interface Standing {
  readonly placement: Placement;
  readonly place: string;
}

function standing(bay: Bay): Map<Id, Standing> {
  const rows: readonly (Level | null)[] = [null, ...bay.levels];
  return new Map(
    rows.flatMap((level, i) =>
      (level?.placements ?? bay.onFloor).map(
        (placement) => [placement.id, { placement, place: i === 0 ? 'floor' : `level ${i}` }] as const,
      ),
    ),
  );
}

function goodsLines(from: Bay, to: Bay, before: Site, after: Site): readonly string[] {
  const name = (site: Site, { placement }: Standing) => site.unitLoads.find((one) => one.id === placement.unitLoadId)?.name ?? 'goods';
  const old = standing(from);
  const lines: string[] = [];
  for (const [id, now] of standing(to)) {
    const was = old.get(id);
    old.delete(id);
    if (was === undefined) lines.push(`Bay ${to.name}, ${now.place}: ${name(after, now)} put on`);
    else if (was.place !== now.place) lines.push(`Bay ${to.name}: ${name(after, now)} from ${was.place} to ${now.place}`);
    else if (!same(was.placement, now.placement)) {
      const [a, b] = [was.placement.atMm, now.placement.atMm];
      lines.push(`Bay ${to.name}, ${now.place}: ${name(after, now)} ${a === b ? 'changed' : `from ${a} to ${b} mm`}`);
    }
  }
  for (const gone of old.values()) lines.push(`Bay ${from.name}, ${gone.place}: ${name(before, gone)} taken off`);
  return lines;
}

/** The site's libraries as the page lists them: where they stand, what they are called, a first entry of each. */
import { opening } from '../../src-core/checks/phrase';
import { addEntry } from '../../src-core/site/edits';
import type { Library } from '../../src-core/site/lookup';
import type { BayTemplate, BeamType, Floor, FrameType, Id, LoadNotice, Pallet, Site, UnitLoad } from '../../src-core/site/site';
import type { UnitSystem } from '../../src-core/units/quantity';
import { firstBay } from '../editing/first-sizes';
import { newId } from '../editing/ids';
import type { OpenSite } from '../state/open-site.svelte';
import type { Refusal, Refused } from '../state/refusal';
import type { Shell } from '../state/shell.svelte';
import { NEEDED_SIZES } from './needed-sizes';
import { NO_SOURCE } from './options';

export type LibraryKind = keyof LibraryItem;

export interface LibraryItem {
  unitLoad: UnitLoad;
  pallet: Pallet;
  notice: LoadNotice;
  beamType: BeamType;
  frameType: FrameType;
  floor: Floor;
  bayTemplate: BayTemplate;
}

export const LIBRARIES: readonly { readonly kind: LibraryKind; readonly list: Library; readonly title: string; readonly item: string }[] = [
  { kind: 'unitLoad', list: 'unitLoads', title: 'Unit loads', item: 'unit load' },
  { kind: 'pallet', list: 'pallets', title: 'Pallets', item: 'pallet' },
  { kind: 'notice', list: 'notices', title: 'Load notices', item: 'load notice' },
  { kind: 'beamType', list: 'beamTypes', title: 'Beam types', item: 'beam type' },
  { kind: 'frameType', list: 'frameTypes', title: 'Frame types', item: 'frame type' },
  { kind: 'floor', list: 'floors', title: 'Floors', item: 'floor' },
  { kind: 'bayTemplate', list: 'bayTemplates', title: 'Bay templates', item: 'bay template' },
];

export function libraryOf(kind: LibraryKind) {
  const found = LIBRARIES.find((one) => one.kind === kind);
  if (found === undefined) throw new RangeError(`there is no library of ${kind}`);
  return found;
}

export const itemsOf = <K extends LibraryKind>(site: Site, kind: K): readonly LibraryItem[K][] =>
  site[libraryOf(kind).list] as readonly unknown[] as readonly LibraryItem[K][];

/**
 * Every number not known, so that nothing passes before it has been entered. The sizes that an entry
 * cannot be without are for drawing only until they are typed: see needed-sizes.ts.
 */
const FRESH: { readonly [K in LibraryKind]: (id: Id, name: string, units: UnitSystem) => LibraryItem[K] } = {
  unitLoad: (id, name) => ({
    id,
    name,
    widthMm: 800,
    depthMm: 1200,
    heightMm: 1200,
    goodsKg: null,
    massUncertaintyPercent: 0,
    massSource: NO_SOURCE,
    palletId: null,
    palletFace: 'width',
    bearing: { kind: 'even' },
    across: { kind: 'even' },
    contact: 'flat',
    chocked: 'unknown',
    leanMm: 0,
  }),
  pallet: (id, name) => ({
    id,
    name,
    lengthMm: 1200,
    widthMm: 800,
    heightMm: 144,
    massKg: null,
    boards: 'along-length',
    runners: [],
    ratedKg: null,
    source: NO_SOURCE,
  }),
  notice: (id, name) => ({
    id,
    name,
    maker: '',
    issued: '',
    levelKg: [],
    unitLoadsPerLevel: null,
    unitLoadKg: null,
    bayKg: null,
    frameKg: null,
    firstBeamMm: null,
    greatestGapMm: null,
    levels: null,
    beamTypeId: null,
    source: { ...NO_SOURCE, kind: 'notice' },
  }),
  beamType: (id, name) => ({
    id,
    name,
    maker: '',
    heightMm: 120,
    widthMm: 50,
    massKgPerM: null,
    connectorsKg: null,
    ratings: [],
    endKg: null,
    secondMomentMm4: null,
    sectionModulusMm3: null,
    elasticModulusNPerMm2: null,
    designStressNPerMm2: null,
    connectorNmmPerRad: null,
    source: NO_SOURCE,
  }),
  frameType: (id, name) => ({
    id,
    name,
    maker: '',
    depthMm: 1100,
    uprightWidthMm: 100,
    massKg: null,
    tableBy: 'greatest-height',
    table: [],
    plateWidthMm: null,
    plateDepthMm: null,
    holePitchMm: null,
    source: NO_SOURCE,
  }),
  floor: (id, name) => ({
    id,
    name,
    kind: 'unknown',
    legN: null,
    pressureNPerMm2: null,
    legPairN: null,
    areaNPerMm2: null,
    thicknessMm: null,
    source: NO_SOURCE,
  }),
  bayTemplate: (id, name, units) => ({ id, name, ...firstBay(units) }),
};

/** @param units of whoever looks: a bay template starts with sizes that are round in them */
export const freshItem = <K extends LibraryKind>(kind: K, id: Id, name: string, units: UnitSystem = 'metric'): LibraryItem[K] =>
  FRESH[kind](id, name, units);

/** A name that no other entry has: "Load notice 3". */
export function freeName(site: Site, kind: LibraryKind): string {
  const { item } = libraryOf(kind);
  const taken = new Set(itemsOf(site, kind).map((one) => one.name));
  const base = opening(item);
  for (let number = taken.size + 1; ; number++) if (!taken.has(`${base} ${number}`)) return `${base} ${number}`;
}

/** Asks first for the sizes that a new entry cannot be without; `then` puts it to use, and its form opens. */
export function newLibraryItem(
  { shell, open }: { shell: Shell; open: OpenSite },
  kind: LibraryKind,
  then: (id: Id) => Refusal = () => null,
): void {
  if (NEEDED_SIZES[kind].length > 0) return shell.ask({ kind: 'new-entry', of: kind, then });
  const id = addLibraryItem(open, kind);
  if (!then(id)) open.openTask(kind, id);
}

/** Adds a fresh entry of which nothing is known. */
export function addLibraryItem(open: OpenSite, kind: LibraryKind): Id {
  const item = freshItem(kind, newId(), freeName(open.site, kind), open.reading.units);
  addEntryNow(open, kind, item);
  return item.id;
}

/** @returns why it was refused, as a sentence; null if it was added */
export function addEntryNow<K extends LibraryKind>(open: OpenSite, kind: K, item: LibraryItem[K]): Refused | null {
  const refused = open.edit(`Add ${item.name}`, (site) => addEntry(site, libraryOf(kind).list, item));
  if (refused === null) open.say(`${item.name} added.`);
  return refused;
}

/** Edits of the libraries, and what in the site a change of an entry touches. */
import { requirePart, type Part, type PartName } from './check-part';
import { changed, refuseNewId, replaced } from './edit-paths';
import { ENTRY_NOUNS, findEntry, type Library, type LibraryEntry } from './lookup';
import type { BayTemplate, BeamType, FrameType, Id, Site, TemplateGoods } from './site';

const PART_OF = {
  pallets: 'pallet',
  unitLoads: 'unitLoad',
  notices: 'notice',
  beamTypes: 'beamType',
  frameTypes: 'frameType',
  floors: 'floor',
  bayTemplates: 'bayTemplate',
} as const satisfies Readonly<Record<Library, PartName>>;

/** A place that uses a library entry, by its id; `bayId` and `runId` where it stands in one. */
export interface Use {
  readonly kind: 'unit load' | 'load notice' | 'run' | 'frame' | 'bay' | 'level' | 'floor of a bay' | 'bay template';
  readonly id: Id;
  readonly runId: Id | null;
  readonly bayId: Id | null;
}

const check = <K extends Library>(site: Site, library: K, entry: LibraryEntry<K>, before: LibraryEntry<K> | null): LibraryEntry<K> => {
  const part: PartName = PART_OF[library];
  return requirePart(site, part, entry as Part<PartName>, before as Part<PartName> | null) as LibraryEntry<K>;
};

const withLibrary = <K extends Library>(site: Site, library: K, entries: readonly LibraryEntry<K>[]): Site =>
  (entries as unknown) === site[library] ? site : { ...site, [library]: entries };

const entriesOf = <K extends Library>(site: Site, library: K): readonly LibraryEntry<K>[] => site[library] as readonly LibraryEntry<K>[];

export const addEntry = <K extends Library>(site: Site, library: K, entry: LibraryEntry<K>): Site =>
  withLibrary(site, library, [...entriesOf(site, library), check(site, library, inRows(entry), null)]);

/** Changes a part of an entry's fields. Rows of a table may be given in any order. */
export function editEntry<K extends Library>(site: Site, library: K, id: Id, part: Partial<LibraryEntry<K>>): Site {
  refuseNewId(id, part);
  const before = findEntry(site, library, id);
  const after = inRows(changed(before, part));
  return after === before
    ? site
    : withLibrary(site, library, replaced(entriesOf(site, library), before, check(site, library, after, before)));
}

/** @throws RangeError if something in the site uses it */
export function removeEntry(site: Site, library: Library, id: Id): Site {
  const gone = findEntry(site, library, id);
  const uses = usesOf(site, library, id).length;
  if (uses > 0)
    throw new RangeError(
      `The ${ENTRY_NOUNS[library]} ${JSON.stringify(gone.name)} is used in ${uses === 1 ? 'one place' : `${uses} places`}. Change them first.`,
    );
  return withLibrary(
    site,
    library,
    entriesOf(site, library).filter((entry) => entry !== gone),
  );
}

/** Ratings by span and frame tables go from the least row up. */
function inRows<T extends LibraryEntry<Library>>(entry: T): T {
  if ('levels' in entry && Array.isArray(entry.levels)) return { ...entry, levels: ascendingBy((entry as BayTemplate).levels, 'heightMm') };
  if ('table' in entry) return { ...entry, table: ascendingBy((entry as FrameType).table, 'heightMm') };
  if ('ratings' in entry) return { ...entry, ratings: ascendingBy((entry as BeamType).ratings, 'spanMm') };
  return entry;
}

const ascendingBy = <K extends string, T extends Readonly<Record<K, number>>>(rows: readonly T[], key: K): readonly T[] =>
  rows.toSorted((a, b) => a[key] - b[key]);

/** Every place whose findings depend on the entry, in the order of the site. A pallet touches its unit loads and wherever they stand. */
export function usesOf(site: Site, library: Library, id: Id): readonly Use[] {
  const uses: Use[] = [];
  const add = (kind: Use['kind'], of: Id, runId: Id | null = null, bayId: Id | null = null) => uses.push({ kind, id: of, runId, bayId });
  if (library === 'beamTypes') for (const one of site.notices) if (one.beamTypeId === id) add('load notice', one.id);
  const loads = new Set(library === 'unitLoads' ? [id] : []);
  if (library === 'pallets')
    for (const one of site.unitLoads)
      if (one.palletId === id) {
        add('unit load', one.id);
        loads.add(one.id);
      }
  const holds = (placements: readonly TemplateGoods[]) => loads.size > 0 && placements.some(({ unitLoadId }) => loads.has(unitLoadId));
  for (const run of site.runs) {
    if (library === 'floors' && run.floorId === id) add('run', run.id, run.id);
    if (library === 'frameTypes') for (const frame of run.frames) if (frame.typeId === id) add('frame', frame.id, run.id);
    for (const bay of run.bays) {
      if (library === 'notices' && bay.noticeId === id) add('bay', bay.id, run.id, bay.id);
      for (const level of bay.levels)
        if ((library === 'beamTypes' && level.beamTypeId === id) || holds(level.placements)) add('level', level.id, run.id, bay.id);
      if (holds(bay.onFloor)) add('floor of a bay', bay.id, run.id, bay.id);
    }
  }
  const inTemplate: (template: BayTemplate) => boolean = ({ noticeId, frameTypeId, levels, onFloor }) =>
    (library === 'notices' && noticeId === id) ||
    (library === 'frameTypes' && frameTypeId === id) ||
    levels.some(({ beamTypeId, placements }) => (library === 'beamTypes' && beamTypeId === id) || holds(placements)) ||
    holds(onFloor);
  for (const template of site.bayTemplates) if (inTemplate(template)) add('bay template', template.id);
  return uses;
}

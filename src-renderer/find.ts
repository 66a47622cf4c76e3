/** Finding bays and goods by name or place. */
import type { Id, Site } from '../src-core/site/site';

export interface Found {
  readonly key: string;
  readonly name: string;
  readonly where: string;
  readonly selection: { readonly bayId: Id; readonly levelId?: Id | null; readonly placementIds?: readonly Id[] };
}

/** No longer list is read to its end. */
export const MOST_FOUND = 60;

/** What matches every word sought, bays first, at most this many. */
export function findIn(site: Site, sought: string, most = MOST_FOUND): readonly Found[] {
  const words = sought.toLowerCase().split(/\s+/).filter(Boolean);
  if (words.length === 0) return [];
  const matches = (text: string) => words.every((word) => text.toLowerCase().includes(word));
  const names = new Map(site.unitLoads.map((one) => [one.id, one.name]));
  const bays: Found[] = [];
  const goods: Found[] = [];
  for (const run of site.runs) {
    for (const bay of run.bays) {
      if (matches(`${run.name} ${bay.name}`)) {
        bays.push({ key: bay.id, name: `Bay ${bay.name}`, where: `run ${run.name}`, selection: { bayId: bay.id } });
      }
      for (const [number, level] of [null, ...bay.levels].entries()) {
        const place = number === 0 ? 'floor' : `level ${number}`;
        for (const placement of level?.placements ?? bay.onFloor) {
          if (goods.length >= most) break;
          const name = names.get(placement.unitLoadId) ?? '';
          if (!matches(`${name} ${run.name} ${bay.name} ${place}`) || !words.some((word) => name.toLowerCase().includes(word))) continue;
          goods.push({
            key: placement.id,
            name,
            where: `run ${run.name}, bay ${bay.name}, ${place}`,
            selection: { bayId: bay.id, levelId: level?.id ?? null, placementIds: [placement.id] },
          });
        }
      }
    }
  }
  return [...bays, ...goods].slice(0, most);
}

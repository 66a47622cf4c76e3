/** Every location to unload or not to reload, with what stands there now and why. */
import { listed } from '../checks/phrase';
import type { Id, Level, Site } from '../site/site';
import type { OpenAction } from './actions';

export interface OffLoadLocation {
  readonly runId: Id;
  readonly bayId: Id;
  readonly levelId: Id;
  readonly runName: string;
  readonly bayName: string;
  /** 1 for the lowest. */
  readonly level: number;
  /** Unload at once, or leave empty once it is emptied. */
  readonly what: 'unload' | 'do-not-reload';
  /** "3 × Tiles"; empty where nothing stands. */
  readonly goods: string;
  /** Null where the mass of something is not known. */
  readonly goodsKg: number | null;
  readonly because: readonly OpenAction[];
}

/**
 * In the order of the site. A level that several actions speak of stands once; "unload" goes before
 * "do not reload". Closed actions ask for nothing.
 */
export function offLoadList(site: Site, actions: readonly OpenAction[]): readonly OffLoadLocation[] {
  const because = new Map<Id, OpenAction[]>();
  for (const action of actions) {
    if (action.closed !== null) continue;
    for (const { levelId } of action.levels) because.set(levelId, [...(because.get(levelId) ?? []), action]);
  }
  return site.runs.flatMap((run) =>
    run.bays.flatMap((bay) =>
      bay.levels.flatMap((level, index) => {
        const asking = because.get(level.id);
        if (asking === undefined) return [];
        return [
          {
            runId: run.id,
            bayId: bay.id,
            levelId: level.id,
            runName: run.name,
            bayName: bay.name,
            level: index + 1,
            what: asking.some(unloads) ? ('unload' as const) : ('do-not-reload' as const),
            ...standing(site, level),
            because: asking,
          },
        ];
      }),
    ),
  );
}

const unloads = ({ kind }: OpenAction): boolean => kind !== 'do-not-reload' && kind !== 're-plumb';

function standing(site: Site, level: Level): Pick<OffLoadLocation, 'goods' | 'goodsKg'> {
  const counts = new Map<Id, number>();
  for (const { unitLoadId } of level.placements) counts.set(unitLoadId, (counts.get(unitLoadId) ?? 0) + 1);
  let kg: number | null = 0;
  const names: string[] = [];
  for (const [id, count] of counts) {
    const load = site.unitLoads.find((one) => one.id === id);
    const pallet = site.pallets.find((one) => one.id === load?.palletId);
    const palletKg = load?.palletId === null ? 0 : (pallet?.massKg ?? null);
    const each = load === undefined || load.goodsKg === null || palletKg === null ? null : load.goodsKg + palletKg;
    names.push(`${count} × ${load?.name ?? id}`);
    kg = kg === null || each === null ? null : kg + count * each;
  }
  return { goods: listed(names), goodsKg: kg };
}

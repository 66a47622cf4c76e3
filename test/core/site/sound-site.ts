/** A site without a fault, and the same spoilt in one place. */
import type { Site } from '../../../src-core/site/site';
import { writeSite } from '../../../src-core/site/write';
import {
  makeBay,
  makeBeamType,
  makeFloor,
  makeFrame,
  makeFrameType,
  makeLevel,
  makeNotice,
  makePallet,
  makePlacement,
  makeRun,
  makeSite,
  makeUnitLoad,
} from '../../make';

const pallet = makePallet({ id: 'pallet' });
const goods = makeUnitLoad({ id: 'goods', palletId: 'pallet' });
const beam = makeBeamType({ id: 'beam', ratings: [{ spanMm: 2700, pairKg: 2500 }] });
const notice = makeNotice({ id: 'notice', beamTypeId: 'beam', levelKg: [2500, null] });
const upright = makeFrameType({ id: 'upright', table: [{ heightMm: 1500, ratedKg: 9800 }] });
const floor = makeFloor({ id: 'floor' });
export function sound(): Site {
  const level = (id: string, heightMm: number) =>
    makeLevel([], { id, heightMm, beamTypeId: 'beam', placements: [makePlacement('goods', 75, { id: `${id}-goods` })] });
  const bay = (id: string) => makeBay([level(`${id}-1`, 1500), level(`${id}-2`, 3000)], { id, noticeId: 'notice' });
  const run = (id: string) => {
    const bays = [bay(`${id}-a`), bay(`${id}-b`)];
    const frames = ['f1', 'f2', 'f3'].map((name) => makeFrame({ id: `${id}-${name}`, typeId: 'upright' }));
    return makeRun(bays, { id, frames, floorId: 'floor' });
  };
  return makeSite({
    id: 'site',
    pallets: [pallet],
    unitLoads: [goods],
    beamTypes: [beam],
    notices: [notice],
    frameTypes: [upright],
    floors: [floor],
    runs: [run('one'), run('two')],
  });
}

/** The sound site's JSON with the value at a path replaced; undefined takes the key out. */
export function spoilt(path: readonly (string | number)[], value: unknown): unknown {
  const json: unknown = JSON.parse(writeSite(sound()));
  let at = json as Record<string | number, unknown>;
  for (const step of path.slice(0, -1)) at = at[step] as Record<string | number, unknown>;
  const last = path.at(-1) ?? '';
  if (value === undefined) delete at[last];
  else at[last] = value;
  return json;
}

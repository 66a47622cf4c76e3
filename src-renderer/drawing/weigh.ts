/** What the core finds a unit load to weigh, and how it presses on the beam. */
import { goodsWork } from '../../src-core/audit/goods';
import type { Pallet, UnitLoad } from '../../src-core/site/site';
import type { BeamLoad } from '../../src-core/statics/load';

export interface Weighed {
  readonly grossKg: number | null;
  /** N, x in mm from the unit load's own left edge; null where it is not known. */
  readonly pieces: BeamLoad | null;
}

/** @param pallet the pallet that `unitLoad.palletId` names; null where it names none */
export function weigh(unitLoad: UnitLoad, pallet: Pallet | null): Weighed {
  const { grossKg, pieces } = goodsWork(
    { unitLoads: new Map([[unitLoad.id, unitLoad]]), pallets: new Map(pallet ? [[pallet.id, pallet]] : []) },
    unitLoad.id,
  );
  return { grossKg, pieces };
}

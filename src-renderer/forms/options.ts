/** Choices that forms offer, in the trade's words. */
import { LOADED_BY, LOADED_BY_WORDS, type LoadedBy } from '../../src-core/checks/clearance-rules';
import type {
  BeamDamage,
  BearingShape,
  Damage,
  Deck,
  DepthShape,
  Floor,
  FrameType,
  Pallet,
  Rules,
  Slope,
  Source,
  UnitLoad,
} from '../../src-core/site/site';

interface Option<V> {
  readonly value: V;
  readonly name: string;
}

export const SOURCE_KINDS: readonly Option<Source['kind']>[] = [
  { value: 'notice', name: 'load notice' },
  { value: 'maker', name: 'maker or supplier' },
  { value: 'drawing', name: 'drawing' },
  { value: 'engineer', name: 'engineer' },
  { value: 'weighed', name: 'weighed' },
  { value: 'measured', name: 'measured' },
  { value: 'declared', name: 'declared by the sender' },
  { value: 'wms', name: 'warehouse system' },
  { value: 'estimated', name: 'estimated' },
  { value: 'unknown', name: 'not known' },
];

export const BEARING_KINDS: readonly Option<BearingShape['kind']>[] = [
  { value: 'even', name: 'even over its width' },
  { value: 'stepped', name: 'stepped, in columns' },
  { value: 'sloped', name: 'sloped' },
  { value: 'profile', name: 'profile of the pile' },
  { value: 'bearers', name: 'on bearers' },
  { value: 'feet', name: 'on feet' },
];

export const SLOPE_WAYS: readonly Option<Slope['by']>[] = [
  { value: 'intensities', name: 'left and right intensity' },
  { value: 'heights', name: 'left and right height' },
  { value: 'ratio', name: 'right over left' },
  { value: 'end-and-slope', name: 'one end and its change' },
];

export const DEPTH_KINDS: readonly Option<DepthShape['kind']>[] = [
  { value: 'even', name: 'even over its depth' },
  { value: 'stepped', name: 'stepped, front to rear' },
  { value: 'sloped', name: 'sloped, front to rear' },
  { value: 'centre', name: 'centre of mass stated' },
];

export const CONTACTS: readonly Option<UnitLoad['contact']>[] = [
  { value: 'flat', name: 'flat base or pallet' },
  { value: 'feet', name: 'small feet' },
  { value: 'wheels', name: 'wheels' },
  { value: 'rims', name: 'rims, such as standing drums' },
  { value: 'lying-round', name: 'round goods lying' },
];

export const PALLET_BOARDS: readonly Option<Pallet['boards']>[] = [
  { value: 'along-length', name: 'along the longer side' },
  { value: 'along-width', name: 'along the shorter side' },
  { value: 'full', name: 'closed underside' },
  { value: 'none', name: 'feet only' },
];

export const LOADED_BY_OPTIONS: readonly Option<LoadedBy>[] = LOADED_BY.map((value) => ({ value, name: LOADED_BY_WORDS[value] }));

export const TABLE_HEIGHTS: readonly Option<FrameType['tableBy']>[] = [
  { value: 'greatest-height', name: 'the greatest unsupported height of the frame' },
  { value: 'storey-height', name: 'each storey’s own height, where the maker says so' },
];

export const DECK_KINDS: readonly Option<Deck['kind']>[] = [
  { value: 'none', name: 'none: goods stand on the beams' },
  { value: 'support-bars', name: 'pallet support bars' },
  { value: 'mesh', name: 'mesh deck' },
  { value: 'panels', name: 'shelf panels' },
];

export const FLOOR_KINDS: readonly Option<Floor['kind']>[] = [
  { value: 'ground-slab', name: 'slab on the ground' },
  { value: 'suspended', name: 'suspended floor' },
  { value: 'unknown', name: 'not known' },
];

export const DAMAGE_MEMBERS: readonly Option<Damage['member']>[] = [
  { value: 'upright-front', name: 'front upright' },
  { value: 'upright-rear', name: 'rear upright' },
  { value: 'bracing', name: 'bracing' },
  { value: 'base-plate', name: 'base plate' },
];

export const BEAM_PARTS: readonly (Option<string> & Pick<BeamDamage, 'beam' | 'member'>)[] = [
  { value: 'front beam', name: 'front beam', beam: 'front', member: 'beam' },
  { value: 'rear beam', name: 'rear beam', beam: 'rear', member: 'beam' },
  { value: 'front connector', name: 'connector of the front beam', beam: 'front', member: 'connector' },
  { value: 'rear connector', name: 'connector of the rear beam', beam: 'rear', member: 'connector' },
];

export const RULE_SETS: readonly Option<Rules['set']>[] = [
  { value: 'european', name: 'European' },
  { value: 'united-states', name: 'United States' },
  { value: 'australian', name: 'Australian' },
];

export const NO_SOURCE: Source = { kind: 'unknown', detail: '', person: '', date: '' };

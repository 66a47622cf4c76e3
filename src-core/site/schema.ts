/** The site as it stands in its file: rules, racks and libraries, key by key in canonical order. */
import { LOADED_BY } from '../checks/clearance-rules';
import { CHECKS } from '../checks/finding';
import { RULE_KEYS, type RuleKey, type RuleSetName } from '../checks/rule-sets';
import { RULES } from '../checks/rule-table';
import {
  choice,
  date,
  flag,
  isRecord,
  list,
  nullable,
  number,
  ownId,
  quote,
  record,
  reference,
  report,
  text,
  variant,
  type Field,
  type Reader,
} from './fields';
import { LIMITS } from './limits';
import {
  aLength,
  aLengthOrZero,
  aMass,
  aName,
  answer,
  aPosition,
  aRating,
  ascending,
  pallet,
  someText,
  source,
  unitLoad,
} from './schema-goods';
import { beamType, floor, frameType, notice } from './schema-ratings';
import type {
  Bay,
  BayTemplate,
  BeamDamage,
  BeamSag,
  Damage,
  Deck,
  Frame,
  Level,
  Placement,
  PlumbReading,
  Rules,
  Run,
  Site,
  TemplateGoods,
  TemplateLevel,
} from './site';

export const placement = record<Placement>('placement', {
  id: ownId(),
  unitLoadId: reference('unit load'),
  atMm: aPosition,
  mirrored: flag,
  towardsFrontMm: aPosition,
});

const deckOfPanels = record<Extract<Deck, { count: number }>>('deck of panels', {
  kind: choice(['mesh', 'panels']),
  count: number({ least: 1, most: LIMITS.panelsOnLevel, whole: true }),
  panelKg: nullable(aRating, 'where only the level is rated'),
  massKg: nullable(aMass),
  source,
});

const deck = variant<Deck, 'kind'>('deck', 'kind', {
  none: record('level without a deck', { kind: choice(['none']) }),
  'support-bars': record('deck of support bars', { kind: choice(['support-bars']), massKg: nullable(aMass) }),
  mesh: deckOfPanels,
  panels: deckOfPanels,
});

const beam = choice(['front', 'rear'] as const);
const measured = nullable(aLengthOrZero, 'where it was not measured');

const beamDamage = record<BeamDamage>('damage of a beam', {
  id: ownId(),
  beam,
  member: choice(['beam', 'connector']),
  torn: flag,
  note: someText,
  found: date,
});

const sag = record<BeamSag>('sag reading', { beam, loadedMm: measured, unloadedMm: measured, sidewaysMm: measured, found: date });

export const level = record<Level>(
  'level',
  {
    id: ownId(),
    heightMm: aLength,
    beamTypeId: nullable(reference('beam type')),
    locks: answer,
    deck,
    beamDamages: list('damages', beamDamage, LIMITS.damagesOnLevel),
    sags: list('sag readings', sag, 2),
    placements: list('placements', placement, LIMITS.goodsOnLevel),
  },
  (value, reader) => once(value, 'sags', 'beam', 'read', reader),
);

export const bay = record<Bay>(
  'bay',
  {
    id: ownId(),
    name: aName,
    clearEntryMm: aLength,
    noticeId: nullable(reference('load notice'), 'where there is none'),
    levels: list('levels', level, LIMITS.levelsInBay),
    onFloor: list('placements', placement, LIMITS.goodsOnLevel),
  },
  (value, reader) => ascending(value, 'levels', 'heightMm', true, 'Levels go from the lowest up', reader),
);

const goodsOfTemplate = record<TemplateGoods>('placement of a bay template', {
  unitLoadId: reference('unit load'),
  atMm: aPosition,
  mirrored: flag,
  towardsFrontMm: aPosition,
});

const levelOfTemplate = record<TemplateLevel>('level of a bay template', {
  heightMm: aLength,
  beamTypeId: nullable(reference('beam type')),
  deck,
  placements: list('placements', goodsOfTemplate, LIMITS.goodsOnLevel),
});

export const bayTemplate = record<BayTemplate>(
  'bay template',
  {
    id: ownId('bay template'),
    name: aName,
    clearEntryMm: aLength,
    noticeId: nullable(reference('load notice'), 'where there is none'),
    frameTypeId: nullable(reference('frame type')),
    frameHeightMm: aLength,
    levels: list('levels', levelOfTemplate, LIMITS.levelsInBay),
    onFloor: list('placements', goodsOfTemplate, LIMITS.goodsOnLevel),
  },
  (value, reader) => ascending(value, 'levels', 'heightMm', true, 'Levels go from the lowest up', reader),
);

const damage = record<Damage>('damage', {
  id: ownId(),
  member: choice(['upright-front', 'upright-rear', 'bracing', 'base-plate']),
  alongMm: measured,
  acrossMm: measured,
  gaugeMm: aLength,
  torn: flag,
  note: someText,
  found: date,
});

const plumb = record<PlumbReading>('plumb reading', { alongMm: aPosition, acrossMm: aPosition, heightMm: aLength, loaded: flag });

export const frame = record<Frame>('frame', {
  id: ownId(),
  name: aName,
  typeId: nullable(reference('frame type')),
  heightMm: aLength,
  anchored: answer,
  restrained: answer,
  plumb: nullable(plumb, 'where it was not measured'),
  damages: list('damages', damage, LIMITS.damagesOnFrame),
});

export const run = record<Run>(
  'run',
  {
    id: ownId('run'),
    name: aName,
    floorId: nullable(reference('floor')),
    loadedBy: choice(LOADED_BY),
    twoDeep: answer,
    backToBack: nullable(
      record('tie to the run behind', { runId: reference('run'), gapMm: aLengthOrZero, rowSpacers: answer }),
      'where there is none',
    ),
    frames: list('frames', frame, LIMITS.baysInRun + 1, 1),
    bays: list('bays', bay, LIMITS.baysInRun),
  },
  (value, reader) => {
    const { frames, bays } = value;
    if (!Array.isArray(frames) || !Array.isArray(bays) || frames.length === bays.length + 1) return;
    const message = `${bays.length} bays stand between ${bays.length + 1} frames, but there are ${frames.length}. Add or remove frames or bays.`;
    report(reader, message, 'frames');
  },
);

const change: Field<Rules['changed'][number]> = record<{ key: RuleKey; value: number; reason: string }>(
  'change of a rule',
  { key: choice(RULE_KEYS), value: number({ most: Number.MAX_VALUE }), reason: someText },
  ({ key, value }, reader) => {
    const rule = typeof key === 'string' && Object.hasOwn(RULES, key) ? RULES[key as RuleKey] : null;
    if (rule === null || typeof value !== 'number' || (value >= rule.least && value <= rule.most)) return;
    report(reader, `This rule may be from ${rule.least} to ${rule.most}, but is ${value}. Correct it.`, 'value');
  },
);

const setNames: readonly RuleSetName[] = ['european', 'united-states', 'australian'];

export const rules = record<Rules>(
  'set of rules',
  {
    set: choice(setNames),
    changed: list('changes', change, RULE_KEYS.length),
    leftOut: list(
      'checks',
      record('check left out', { check: choice(CHECKS), reason: text(LIMITS.detailLength, { visible: true }) }),
      CHECKS.length,
    ),
    fullComplement: flag,
    frameTable: choice(['next-taller-row', 'interpolate']),
    twoAmbersMakeRed: flag,
    span: choice(['clear-entry', 'centre-to-centre']),
  },
  (value, reader) => {
    once(value, 'changed', 'key', 'changed', reader);
    once(value, 'leftOut', 'check', 'left out', reader);
  },
);

/** Tells of a rule that is changed twice or a check that is left out twice. */
function once(value: Readonly<Record<string, unknown>>, rows: string, key: string, done: string, reader: Reader): void {
  const entries = value[rows];
  if (!Array.isArray(entries)) return;
  const names = entries.map((entry) => (isRecord(entry) ? entry[key] : undefined));
  names.forEach((name, i) => {
    if (typeof name === 'string' && names.indexOf(name) < i) report(reader, `"${name}" is ${done} twice. Keep one of them.`, rows, i, key);
  });
}

const library = <T>(plural: string, entry: Field<T>) => list(plural, entry, LIMITS.libraryEntries);

export const site = record<Site>(
  'site',
  {
    id: ownId(),
    name: aName,
    notes: text(LIMITS.notesLength),
    units: choice(['metric', 'us']),
    rules,
    seismic: answer,
    outdoors: answer,
    pallets: library('pallets', pallet),
    unitLoads: library('unit loads', unitLoad),
    notices: library('load notices', notice),
    beamTypes: library('beam types', beamType),
    frameTypes: library('frame types', frameType),
    floors: library('floors', floor),
    bayTemplates: library('bay templates', bayTemplate),
    runs: list('runs', run, LIMITS.runs),
  },
  tiesAgree,
);

/** Two runs back to back name each other with the same gap and spacers, or one side's checks would miss the other. */
function tiesAgree({ runs }: Readonly<Record<string, unknown>>, reader: Reader): void {
  if (!Array.isArray(runs)) return;
  const all = new Map(runs.filter(isRecord).map((one) => [one.id, one]));
  runs.forEach((one: unknown, i) => {
    if (!isRecord(one) || !isRecord(one.backToBack)) return;
    const { runId, gapMm, rowSpacers } = one.backToBack;
    const behind = all.get(runId);
    if (behind === undefined) return;
    const at = ['runs', i, 'backToBack'];
    const back = isRecord(behind.backToBack) ? behind.backToBack : null;
    if (behind === one)
      report(reader, 'A run cannot stand back to back with itself. Name the run behind it, or write null.', ...at, 'runId');
    else if (back === null || back.runId !== one.id)
      report(
        reader,
        `Names the run ${quote(runId)}, which does not name this one back. Tie both to each other or neither.`,
        ...at,
        'runId',
      );
    else if (back.gapMm !== gapMm || back.rowSpacers !== rowSpacers)
      report(reader, `Differs in gap or row spacers from what the run ${quote(runId)} says of the same tie. Make them agree.`, ...at);
  });
}

/** Papers about one bay: the bay sheet, and the worked calculation in full. */
import type { BayAudit, FrameAudit } from '../audit/types';
import { dateWords } from '../units/dates';
import { findBay } from '../site/lookup';
import type { Id, Level, Site } from '../site/site';
import type { Text } from '../units/text';
import { stillOpen, type OpenAction } from '../visit/actions';
import { actionBlocks } from './action-blocks';
import { closingBlocks, frameStands, paperOf, runAuditOf, type PaperInput } from './context';
import { findingBlocks, findingsInFull, findingsOfBay, levelTitle, used, USED_REMARK, type BayNames } from './findings';
import { fact, facts, heading, kgCell, mmCell, NONE, paragraph, subheading, table, type Block, type Paper } from './paper';

interface BayAt extends BayNames {
  readonly input: PaperInput;
  readonly audit: BayAudit;
  readonly frames: readonly FrameAudit[];
}

/** @throws RangeError if the site or its audit does not have the bay */
function bayAt(input: PaperInput, bayId: Id): BayAt {
  const { run, bay, index } = findBay(input.site, bayId);
  const audited = runAuditOf(input, run.id);
  const audit = audited.bays.find((one) => one.bayId === bayId);
  if (audit === undefined) throw new RangeError(`the audit has no bay "${bayId}"`);
  return { input, site: input.site, run, bay, audit, frames: audited.frames.slice(index, index + 2) };
}

const nameOf = ({ run, bay }: BayAt): string => `Bay ${bay.name}, run ${run.name}`;

/**
 * Drawing, loads, findings, open actions, assumptions, cautions and room to sign, of one bay.
 * @param actions of the site, from `actionsOf`: what visits found stands beside what was checked
 */
export function baySheet(input: PaperInput, bayId: Id, actions: readonly OpenAction[]): Paper {
  const at = bayAt(input, bayId);
  const { run, bay, audit, frames } = at;
  return paperOf(input, [bay], {
    kind: 'bay-sheet',
    title: 'Bay sheet',
    about: nameOf(at),
    blocks: [
      ...opening(at),
      ...openOfBay(input, bayId, actions),
      { kind: 'drawing', drawing: 'bay', runId: run.id, bayId, levelId: null, says: drawingWords(at) },
      heading('Levels'),
      levelTable(at),
      goodsTable(at),
      ...frameBlocks(at),
      ...findingBlocks(at, findingsOfBay(runAuditOf(input, run.id), audit, frames)),
      ...closingBlocks(input, [bay]),
      {
        kind: 'sign-off',
        lines: [
          { role: 'Drawn up by', signed: null },
          { role: 'Competent person', signed: null },
        ],
      },
    ],
  });
}

/** What is open at the bay, before any verdict is read: locks, notices and the like are in no check of loads. */
function openOfBay({ site }: PaperInput, bayId: Id, actions: readonly OpenAction[]): readonly Block[] {
  const open = stillOpen(actions).filter(({ bayIds }) => bayIds.includes(bayId));
  return open.length === 0 ? [] : actionBlocks(site, open);
}

/** Every check of a bay, or of one of its levels, step by step. */
export function workedCalculation(input: PaperInput, bayId: Id, levelId: Id | null = null): Paper {
  const at = bayAt(input, bayId);
  const { bay, audit, frames } = at;
  const levels = levelId === null ? audit.levels.toReversed() : audit.levels.filter((level) => level.levelId === levelId);
  if (levelId !== null && levels.length === 0) throw new RangeError(`bay "${bayId}" has no level "${levelId}"`);
  return paperOf(input, [bay], {
    kind: 'worked-calculation',
    title: 'Worked calculation',
    about: levelId === null ? nameOf(at) : `${levelTitle(bay, levelId)} of ${nameOf(at).toLowerCase()}`,
    blocks: [
      ...opening(at),
      goodsTable(at),
      ...levels.flatMap((level): Block[] => [
        heading(levelTitle(bay, level.levelId)),
        ...levelDrawing(at, level.levelId),
        ...findingsInFull(at, level.findings),
      ]),
      ...(levelId === null
        ? [
            heading('Bay'),
            ...findingsInFull(at, audit.findings),
            heading('Upright frames and floor'),
            ...findingsInFull(
              at,
              frames.flatMap((frame) => frame.findings),
            ),
          ]
        : []),
      ...closingBlocks(input, [bay]),
      { kind: 'sign-off', lines: [{ role: 'Checked by', signed: null }] },
    ],
  });
}

/** Nothing where nothing stands: there is no load to draw. */
const levelDrawing = ({ run, bay }: BayAt, levelId: Id): readonly Block[] =>
  bay.levels.find(({ id }) => id === levelId)?.placements.length === 0
    ? []
    : [
        {
          kind: 'drawing',
          drawing: 'level',
          runId: run.id,
          bayId: bay.id,
          levelId,
          says: `${levelTitle(bay, levelId)}: load intensity, shear force, bending moment and deflection along the beam`,
        },
      ];

function opening({ input, bay, run, audit }: BayAt): readonly Block[] {
  const notice = input.site.notices.find(({ id }) => id === bay.noticeId);
  const stated = notice === undefined ? 'none' : `${notice.name}${notice.issued === '' ? '' : `, issued ${dateWords(notice.issued)}`}`;
  return [
    facts([
      fact('Verdict', { verdict: audit.verdict }),
      fact('Goods on beam levels', kgCell(audit.totalKg)),
      fact('Clear entry', mmCell(bay.clearEntryMm)),
      fact('Run', [run.name]),
      fact('Load notice', [stated]),
    ]),
    ...(audit.governing === null ? [] : [paragraph(['Decided by: ', ...audit.governing.says])]),
    USED_REMARK,
  ];
}

const drawingWords = ({ bay }: BayAt): string =>
  `Front view of bay ${bay.name} to scale, with its goods and the load intensity of each level standing on the beams`;

const beamName = (site: Site, level: Level): Text => [site.beamTypes.find(({ id }) => id === level.beamTypeId)?.name ?? 'not known'];

function levelTable({ input: { site }, bay, audit }: BayAt): Block {
  return table(
    `Beam levels of bay ${bay.name}, from the top down`,
    ['Level', '#Height', 'Beams', 'Locks', '#Goods', '#Rating of the pair', '#Used', 'Verdict'],
    bay.levels
      .map((level, index) => {
        const found = audit.levels[index];
        return [
          [`Level ${index + 1}`],
          mmCell(level.heightMm),
          beamName(site, level),
          [level.locks === 'yes' ? 'in place' : level.locks === 'no' ? 'missing' : 'not known'],
          kgCell(found?.totalKg),
          kgCell(found?.ratedKg),
          used(found?.governing?.utilisation ?? null),
          found === undefined ? NONE : { verdict: found.verdict },
        ] as const;
      })
      .toReversed(),
  );
}

function goodsTable({ input: { site }, bay }: BayAt): Block {
  const rows = [
    ...bay.levels.map((level, index) => ({ title: `Level ${index + 1}`, placements: level.placements })).toReversed(),
    { title: 'Floor', placements: bay.onFloor },
  ].flatMap(({ title, placements }) =>
    placements.map((placement) => {
      const load = site.unitLoads.find(({ id }) => id === placement.unitLoadId);
      const pallet = site.pallets.find(({ id }) => id === load?.palletId);
      return [
        [title],
        [load?.name ?? placement.unitLoadId],
        mmCell(placement.atMm),
        mmCell(load?.widthMm),
        kgCell(load?.goodsKg),
        load === undefined || load.palletId === null ? NONE : kgCell(pallet?.massKg),
      ] as const;
    }),
  );
  return rows.length === 0
    ? paragraph(['No goods stand in this bay.'])
    : table('Goods, from the left upright’s face', ['Where', 'Goods', '#From left', '#Width', '#Goods’ mass', '#Pallet’s mass'], rows);
}

function frameBlocks({ run, frames }: BayAt): readonly Block[] {
  return frames.flatMap((found): Block[] => {
    const frame = run.frames.find(({ id }) => id === found.frameId);
    if (frame === undefined) return [];
    return [
      subheading(`Upright frame ${frame.name}, ${frameStands(run, frame)}`),
      facts([fact('Verdict', { verdict: found.verdict })]),
      ...(found.storeys.length === 0
        ? []
        : [
            table(
              'Load of the frame by storey, from the top down',
              ['#From', '#To', '#Front', '#Rear', '#Both', '#Rated'],
              found.storeys
                .map((storey) => [
                  mmCell(storey.fromMm),
                  mmCell(storey.toMm),
                  ...[storey.frontKg, storey.rearKg, storey.totalKg, storey.ratedKg].map(kgCell),
                ])
                .toReversed(),
            ),
          ]),
    ];
  });
}

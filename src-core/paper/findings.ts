/** Findings as parts of a paper: what is wrong first, then what is within, and what has to be found out. */
import type { BayAudit, FrameAudit, LevelAudit, RunAudit } from '../audit/types';
import { compareVerdicts, type CheckName, type Finding, type Place } from '../checks/finding';
import type { Bay, Run, Site } from '../site/site';
import { ratioOf } from '../units/quantity';
import { say, type Text } from '../units/text';
import { CHECK_WORDS } from '../words/check-names';
import { heading, list, NONE, paragraph, remark, subheading, table, type Block, type Cell } from './paper';

export const levelTitle = (bay: Bay, levelId: string): string => {
  const index = bay.levels.findIndex(({ id }) => id === levelId);
  return index < 0 ? 'Floor' : `Level ${index + 1}`;
};

/** A bay with what is needed to name the places in it. */
export interface BayNames {
  readonly site: Site;
  readonly run: Run;
  readonly bay: Bay;
}

/** "Level 2, front beam, left end"; "Frame A-F2, rear upright"; "Level 1, Tiles (2nd from the left)"; "Bay". */
export function placeTitle({ site, run, bay }: BayNames, place: Place): string {
  const frame = run.frames.find(({ id }) => id === place.frameId);
  const goods = place.placementId === undefined ? null : goodsTitle(site, bay, place.placementId);
  return [
    place.levelId !== undefined
      ? levelTitle(bay, place.levelId)
      : frame
        ? `Frame ${frame.name}`
        : place.bayId !== undefined
          ? 'Bay'
          : 'Run',
    place.beam && `${place.beam} beam`,
    place.end && `${place.end} end`,
    place.post && `${place.post} upright`,
    goods,
  ]
    .filter((part) => part !== undefined && part !== null && part !== '')
    .join(', ');
}

function goodsTitle(site: Site, bay: Bay, placementId: string): string | null {
  for (const placements of [...bay.levels.map((level) => level.placements), bay.onFloor]) {
    const index = placements.findIndex(({ id }) => id === placementId);
    const name = site.unitLoads.find(({ id }) => id === placements[index]?.unitLoadId)?.name;
    if (name !== undefined) return placements.length === 1 ? name : `${name} (${ordinal(index + 1)} from the left)`;
  }
  return null;
}

const ordinal = (n: number): string => {
  const teen = n % 100 >= 11 && n % 100 <= 13;
  return `${n}${(teen ? undefined : { 1: 'st', 2: 'nd', 3: 'rd' }[n % 10]) ?? 'th'}`;
};

/** Everything found about a bay: itself, its levels from the top down, its frames, and the run. */
export function findingsOfBay(run: RunAudit, bay: BayAudit, frames: readonly FrameAudit[]): readonly Finding[] {
  return [
    ...bay.findings,
    ...bay.levels.toReversed().flatMap((level: LevelAudit) => level.findings),
    ...frames.flatMap(({ findings }) => findings),
    ...run.findings,
  ];
}

/** The worst first; of equals the one used furthest. */
export const byWeight = (a: Finding, b: Finding): number =>
  compareVerdicts(b.verdict, a.verdict) || Number(b.counts) - Number(a.counts) || (b.utilisation ?? -1) - (a.utilisation ?? -1);

export const used = (utilisation: number | null): Text => (utilisation === null ? NONE : say`${ratioOf(utilisation)}`);

export function findingBlocks(names: BayNames, findings: readonly Finding[]): readonly Block[] {
  const counting = findings.filter(({ counts }) => counts).toSorted(byWeight);
  const open = counting.filter(({ verdict }) => verdict !== 'within');
  const within = counting.filter(({ verdict }) => verdict === 'within');
  const others = findings.filter(({ counts }) => !counts);
  const row = (one: Finding, says: readonly Cell[]): readonly Cell[] => [
    [placeTitle(names, one.place)],
    [CHECK_WORDS[one.check].name],
    { verdict: one.verdict },
    used(one.utilisation),
    ...says,
  ];
  return [
    heading('Findings'),
    ...(open.length === 0
      ? [paragraph(['Nothing is over, close, not assessable or not possible.'])]
      : [
          table(
            'What is not simply within',
            ['Where', 'Check', 'Verdict', '#Used', 'What was found'],
            open.map((one) => row(one, [[...one.says, ...one.notes.flatMap((note) => [' ', ...note])]])),
          ),
        ]),
    ...missingBlocks(findings),
    ...byCheck(names, 'What is within, each check where it is used furthest', within),
    ...byCheck(names, 'For information, not counted in the verdict', others.toSorted(byWeight)),
  ];
}

/** One row a check, so that a sheet stays short: every single place stands in the worked calculation. */
function byCheck(names: BayNames, caption: string, findings: readonly Finding[]): readonly Block[] {
  const checks = new Map<CheckName, readonly Finding[]>();
  for (const one of findings) checks.set(one.check, [...(checks.get(one.check) ?? []), one]);
  if (checks.size === 0) return [];
  const rows = Array.from(checks.values(), (all): readonly Cell[] => {
    const [worst] = all as readonly [Finding, ...Finding[]];
    const where = placeTitle(names, worst.place);
    return [
      [CHECK_WORDS[worst.check].name],
      [all.length === 1 ? where : `${where}; ${all.length} places in all`],
      used(worst.utilisation),
      worst.says,
    ];
  });
  return [table(caption, ['Check', 'Where', '#Used', 'What was found'], rows)];
}

/** What is not known, each once, and how to get it. */
function missingBlocks(findings: readonly Finding[]): readonly Block[] {
  const missing = new Map(findings.flatMap((one) => one.missing.map((input) => [`${input.input} ${input.field}`, input] as const)));
  if (missing.size === 0) return [];
  return [
    table(
      'To be found out',
      ['What is not known', 'How to get it'],
      Array.from(missing.values(), ({ input, how }) => [[input], [how]]),
    ),
  ];
}

/** What the column "Used" says, for whoever has not seen the program. */
export const USED_REMARK: Block = remark(['Used: the share of what is allowed that is taken up. 1 is all of it; more than 1 is too much.']);

/** Findings in full: first those that compare without a calculation, in one table, then each worked calculation. */
export function findingsInFull(names: BayNames, findings: readonly Finding[]): readonly Block[] {
  const compared = findings.filter(({ worked }) => worked.length === 0);
  return [
    ...(compared.length === 0
      ? []
      : [
          table(
            'Compared without a calculation',
            ['Check', 'Where', 'Verdict', 'What was found'],
            compared.map((one) => [
              [CHECK_WORDS[one.check].name],
              [placeTitle(names, one.place)],
              { verdict: one.verdict },
              [...one.says, ...[...one.notes, ...one.missing.map(notKnown)].flatMap((text) => [' ', ...text])],
            ]),
          ),
        ]),
    ...findings.filter(({ worked }) => worked.length > 0).flatMap((one) => workedBlocks(names, one)),
  ];
}

const notKnown = ({ input, how }: Finding['missing'][number]): Text => say`Not known: ${input}. ${how}`;

/** The worked calculation of a finding, after its sentence and notes: behind it they would stand alone on the next page. */
function workedBlocks(names: BayNames, one: Finding): readonly Block[] {
  return [
    subheading(`${CHECK_WORDS[one.check].name}: ${placeTitle(names, one.place)}`),
    {
      kind: 'facts',
      facts: [
        { label: 'Verdict', value: { verdict: one.verdict } },
        { label: 'Used', value: used(one.utilisation) },
      ],
    },
    paragraph(one.says),
    ...list([...one.notes, ...one.missing.map(notKnown)]),
    { kind: 'worked', steps: one.worked },
  ];
}

/** What a batch run says of a site: its bays and levels as rows, for people and as JSON. */
import type { BayAudit, LevelAudit, RunAudit, SiteAudit } from '../src-core/audit/types';
import type { CheckName, Finding, Verdict } from '../src-core/checks/finding';
import { RULE_SET_TITLES, type RuleSetName } from '../src-core/checks/rule-sets';
import type { Bay, Run, Site } from '../src-core/site/site';
import { formatQuantity, formatText, type Reading } from '../src-core/units/format';
import { massOf } from '../src-core/units/quantity';
import { CHECK_WORDS } from '../src-core/words/check-names';
import { VERDICT_WORDS } from '../src-core/words/verdict-words';

/** Columns of the table that are utilisations, by the check that gives them. */
const UTILISATIONS = {
  total: 'level-total',
  bending: 'beam-bending',
  endShear: 'beam-end-shear',
  deflection: 'beam-deflection',
} as const satisfies Record<string, CheckName>;
type Column = keyof typeof UTILISATIONS;

interface FindingReport {
  readonly check: CheckName;
  readonly verdict: Verdict;
  readonly utilisation: number | null;
  readonly says: string;
  readonly missing: readonly { readonly input: string; readonly how: string; readonly field: string }[];
}

interface LevelReport {
  readonly level: number;
  readonly levelId: string;
  readonly totalKg: number | null;
  readonly ratedKg: number | null;
  /** Demand over what is allowed; null where it could not be found. */
  readonly utilisation: Readonly<Record<Column, number | null>>;
  /** True where the level is judged as a designed full complement and these utilisations only inform. */
  readonly fullComplement: boolean;
  readonly governing: FindingReport | null;
  readonly verdict: Verdict;
  /** Everything that keeps the level from being within. */
  readonly findings: readonly FindingReport[];
}

interface BayReport {
  readonly run: string;
  readonly bay: string;
  readonly bayId: string;
  readonly totalKg: number | null;
  readonly governing: FindingReport | null;
  readonly verdict: Verdict;
  readonly levels: readonly LevelReport[];
  /** What the bay itself and its two frames add. */
  readonly findings: readonly FindingReport[];
}

export interface SiteReport {
  readonly site: string;
  readonly ruleSet: RuleSetName;
  readonly verdict: Verdict;
  readonly bays: readonly BayReport[];
  /** What whole runs add. */
  readonly findings: readonly FindingReport[];
  readonly notChecked: readonly { readonly check: CheckName; readonly reason: string }[];
}

export function reportOf(site: Site, audit: SiteAudit): SiteReport {
  const reading: Reading = { units: site.units, locale: 'en' };
  const report = (finding: Finding): FindingReport => ({
    check: finding.check,
    verdict: finding.verdict,
    utilisation: finding.utilisation,
    says: formatText(finding.says, reading),
    missing: finding.missing,
  });
  const against = (findings: readonly Finding[]) =>
    findings.filter(({ counts, verdict }) => counts && verdict !== 'within').map((finding) => report(finding));
  const level = (audited: LevelAudit, index: number): LevelReport => {
    const of = (check: CheckName) => audited.findings.find((finding) => finding.check === check);
    const complement = of('full-complement');
    return {
      level: index + 1,
      levelId: audited.levelId,
      totalKg: audited.totalKg,
      ratedKg: audited.ratedKg,
      utilisation: {
        total: of(UTILISATIONS.total)?.utilisation ?? null,
        bending: of(UTILISATIONS.bending)?.utilisation ?? null,
        endShear: of(UTILISATIONS.endShear)?.utilisation ?? null,
        deflection: of(UTILISATIONS.deflection)?.utilisation ?? null,
      },
      fullComplement: complement !== undefined && complement.counts,
      governing: audited.governing && report(audited.governing),
      verdict: audited.verdict,
      findings: against(audited.findings),
    };
  };
  const bay = (run: Run, audited: RunAudit, one: Bay, result: BayAudit, index: number): BayReport => ({
    run: run.name,
    bay: one.name,
    bayId: one.id,
    totalKg: result.totalKg,
    governing: result.governing && report(result.governing),
    verdict: result.verdict,
    levels: result.levels.map(level),
    findings: [...against(result.findings), ...audited.frames.slice(index, index + 2).flatMap(({ findings }) => against(findings))],
  });
  const runs = audit.runs.flatMap((audited) => {
    const run = site.runs.find(({ id }) => id === audited.runId);
    return run === undefined ? [] : [{ run, audited }];
  });
  return {
    site: site.name,
    ruleSet: site.rules.set,
    verdict: audit.verdict,
    bays: runs.flatMap(({ run, audited }) =>
      audited.bays.flatMap((result, index) => {
        const one = run.bays[index];
        return one === undefined ? [] : [bay(run, audited, one, result, index)];
      }),
    ),
    findings: runs.flatMap(({ audited }) => against(audited.findings)),
    notChecked: site.rules.leftOut,
  };
}

const HEADINGS = ['Bay', 'Level', 'Carries', 'Rated', 'Total', 'Bending', 'Beam end', 'Sag', 'Governed by', 'Verdict'];

/** The report as lines for a terminal, without cautions. */
export function reportLines(report: SiteReport, site: Site): readonly string[] {
  const reading: Reading = { units: site.units, locale: 'en' };
  const kg = (value: number | null) => (value === null ? 'not known' : formatQuantity(massOf(value), reading));
  const rows = report.bays.flatMap((bay) => [
    ...bay.levels.map((level) => [
      `${bay.run} ${bay.bay}`,
      String(level.level),
      kg(level.totalKg),
      kg(level.ratedKg),
      ratio(level.utilisation.total, false),
      ...(['bending', 'endShear', 'deflection'] as const).map((column) => ratio(level.utilisation[column], level.fullComplement)),
      governed(level.governing),
      VERDICT_WORDS[level.verdict].word,
    ]),
    [`${bay.run} ${bay.bay}`, 'bay', kg(bay.totalKg), '', '', '', '', '', governed(bay.governing), VERDICT_WORDS[bay.verdict].word],
  ]);
  const notChecked = report.notChecked.map(({ check, reason }) => `Not checked: ${CHECK_WORDS[check].name}. ${reason}`);
  const head = [
    `${report.site}: ${VERDICT_WORDS[report.verdict].word}`,
    `${RULE_SET_TITLES[report.ruleSet]} rule set. Utilisations are of the rating; in brackets: for information, judged as a designed full complement.`,
  ];
  const body = rows.length === 0 ? ['The site has no bays.'] : table([HEADINGS, ...rows]);
  return [head, body, reasons(report), notChecked].filter((part) => part.length > 0).flatMap((part) => [...part, '']);
}

/** Every reason why a bay is not within, each once. */
function reasons(report: SiteReport): readonly string[] {
  const lines = report.bays.flatMap((bay) => {
    const name = `${bay.run} ${bay.bay}`;
    return [
      ...bay.levels.flatMap(({ level, findings }) => findings.map((finding) => `${name}, level ${level}: ${sentence(finding)}`)),
      ...bay.findings.map((finding) => `${name}: ${sentence(finding)}`),
    ];
  });
  return [...new Set([...lines, ...report.findings.map(sentence)])];
}

const sentence = ({ check, verdict, says, missing }: FindingReport): string =>
  [`${CHECK_WORDS[check].name}, ${VERDICT_WORDS[verdict].word.toLowerCase()}. ${says}`, ...missing.map(({ how }) => how)].join(' ');

const governed = (finding: FindingReport | null): string => (finding === null ? '' : CHECK_WORDS[finding.check].name);

const ratio = (value: number | null, informs: boolean): string => {
  if (value === null) return '–';
  const text = Number.isFinite(value) ? value.toPrecision(3) : 'no rating';
  return informs ? `(${text})` : text;
};

/** Columns padded to their widest entry; figures to the right, words to the left. */
function table(rows: readonly (readonly string[])[]): readonly string[] {
  const widths = HEADINGS.map((_, column) => Math.max(...rows.map((row) => row[column]?.length ?? 0)));
  return rows.map((row) =>
    row
      .map((cell, column) => (column >= 2 && column <= 7 ? cell.padStart(widths[column] ?? 0) : cell.padEnd(widths[column] ?? 0)))
      .join('  ')
      .trimEnd(),
  );
}

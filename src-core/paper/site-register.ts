/** The site register: every bay with its verdict, what decides it, its rating's source and its visits. */
import type { BayAudit } from '../audit/types';
import { classOfDamage, type DamageClass } from '../checks/damage-class';
import { resolveRules, type ResolvedRules } from '../checks/rule-sets';
import { VERDICTS, worstVerdict, type Verdict } from '../checks/finding';
import { sourceWords } from '../audit/source-words';
import type { Bay, Id, Run } from '../site/site';
import { say } from '../units/text';
import { stillOpen, type OpenAction } from '../visit/actions';
import { duesOf } from '../visit/rounds';
import type { FollowUp } from '../visit/follow-up';
import type { Visit } from '../visit/visit';
import { CHECK_WORDS } from '../words/check-names';
import { VERDICT_WORDS } from '../words/verdict-words';
import { closingBlocks, paperOf, runAuditOf, type PaperInput } from './context';
import { used, USED_REMARK } from './findings';
import { dayCell, fact, facts, heading, kgCell, NONE, table, type Block, type Cell, type Paper } from './paper';

export function siteRegister(input: PaperInput, visits: readonly Visit[], followUp: FollowUp, actions: readonly OpenAction[]): Paper {
  const { site } = input;
  const bays = site.runs.flatMap((run) => run.bays);
  const rules = resolveRules(site.rules);
  const dues = new Map(duesOf(site, visits, followUp).map((due) => [due.bayId, due]));
  const open = new Map<Id, number>();
  for (const { bayIds } of stillOpen(actions)) for (const id of bayIds) open.set(id, (open.get(id) ?? 0) + 1);
  const audited = site.runs.flatMap((run) => runAuditOf(input, run.id).bays);
  return paperOf(input, bays, {
    kind: 'site-register',
    title: 'Site register',
    about: site.name,
    wide: true,
    blocks: [
      facts([
        fact('Bays', [String(bays.length)]),
        ...VERDICTS.map((verdict) => ({ verdict, count: audited.filter((bay) => bay.verdict === verdict).length }))
          .filter(({ count }) => count > 0)
          .map(({ verdict, count }) => fact(VERDICT_WORDS[verdict].word, [String(count)])),
        fact('Answers for the racks', [followUp.responsible === '' ? 'not named' : followUp.responsible]),
      ]),
      USED_REMARK,
      ...site.runs.flatMap((run): Block[] => [
        heading(`Run ${run.name}`),
        ...(run.bays.length === 0
          ? []
          : [
              table(
                `Bays of run ${run.name}`,
                [
                  'Bay',
                  'Verdict',
                  'Decided by',
                  '#Used',
                  '#Goods',
                  'Load notice and its source',
                  'Frames',
                  'Damage',
                  '#Open actions',
                  'Visited',
                  'Next visit',
                  'Inspected',
                ],
                run.bays.map((bay, index) => {
                  const audit = runAuditOf(input, run.id).bays[index];
                  const due = dues.get(bay.id);
                  return [
                    [bay.name],
                    { verdict: audit?.verdict ?? 'not-assessable' },
                    decidedBy(audit),
                    used(audit?.governing?.utilisation ?? null),
                    kgCell(audit?.totalKg),
                    notice(input, bay),
                    { verdict: framesVerdict(input, run, index) },
                    damageCell(run, index, rules, input.today),
                    [String(open.get(bay.id) ?? 0)],
                    due === undefined || due.visited === null ? ['never'] : dayCell(due.visited),
                    due === undefined || due.nextVisit === null ? ['due'] : dayCell(due.nextVisit),
                    due === undefined || due.inspected === null ? ['never'] : dayCell(due.inspected),
                  ];
                }),
              ),
            ]),
      ]),
      ...closingBlocks(input, bays),
      { kind: 'sign-off', lines: [{ role: 'Answers for the racks', signed: null }] },
    ],
  });
}

const decidedBy = (audit: BayAudit | undefined): Cell =>
  audit === undefined || audit.governing === null ? NONE : [CHECK_WORDS[audit.governing.check].name];

function notice({ site }: PaperInput, bay: Bay): Cell {
  const found = site.notices.find(({ id }) => id === bay.noticeId);
  return found === undefined ? ['none'] : say`${found.name} (${sourceWords(found.source)})`;
}

function framesVerdict(input: PaperInput, run: Run, index: number): Verdict {
  return worstVerdict(
    runAuditOf(input, run.id)
      .frames.slice(index, index + 2)
      .map(({ verdict }) => verdict),
  );
}

const WORST: readonly DamageClass[] = ['red', 'unclassed', 'amber', 'green'];

function damageCell(run: Run, index: number, rules: ResolvedRules, today: string): Cell {
  const classes = run.frames
    .slice(index, index + 2)
    .flatMap(({ damages }) => damages.map((damage) => classOfDamage(damage, rules, today).class));
  // Any damage of a beam is red, as its check has it.
  if (run.bays[index]?.levels.some(({ beamDamages }) => beamDamages.length > 0)) classes.push('red');
  const worst = WORST.find((one) => classes.includes(one));
  return worst === undefined ? NONE : { damage: worst };
}

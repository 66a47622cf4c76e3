/** The report of a visit: what was looked at, found, classed and has to be done, with room to sign. */
import type { LevelAudit } from '../audit/types';
import { classOfDamage, type DamageClass, type DamageJudged } from '../checks/damage-class';
import { resolveRules, sourceOf, type ResolvedRules } from '../checks/rule-sets';
import type { Bay, Id, Run, Site } from '../site/site';
import { dateWords } from '../units/dates';
import { lengthOf, quantity, ratioOf } from '../units/quantity';
import { say, type Text } from '../units/text';
import type { OpenAction } from '../visit/actions';
import { noticeDiffers } from '../visit/notice-seen';
import { judgeSagOfLevel } from '../visit/sag-of-level';
import { CHECKLIST, type BayVisit, type FrameDamage, type SagReading, type Visit } from '../visit/visit';
import { BEAM_MEMBER_WORDS, CHECKLIST_WORDS, DAMAGE_CLASS_WORDS, FRAME_MEMBER_WORDS, VISIT_KIND_WORDS } from '../words/visit-words';
import { actionBlocks } from './action-blocks';
import { closingBlocks, counted, paperOf, type PaperInput } from './context';
import { levelTitle } from './findings';
import {
  dayCell,
  fact,
  facts,
  heading,
  list,
  mmCell,
  NONE,
  paragraph,
  remark,
  subheading,
  table,
  unbroken,
  type Block,
  type Cell,
  type Paper,
} from './paper';

interface Seen {
  readonly run: Run;
  readonly bay: Bay;
  readonly seen: BayVisit;
}

/**
 * @param actions of the site, from `actionsOf`; those of the visit's bays are printed
 */
export function visitReport(input: PaperInput, visit: Visit, actions: readonly OpenAction[]): Paper {
  const { site } = input;
  const seen = visit.bays.flatMap((one): Seen[] => {
    const run = site.runs.find(({ id }) => id === one.runId);
    const bay = run?.bays.find(({ id }) => id === one.bayId);
    return run && bay ? [{ run, bay, seen: one }] : [];
  });
  const bays = seen.map(({ bay }) => bay);
  const rules = resolveRules(site.rules);
  const ids = new Set(bays.map(({ id }) => id));
  return paperOf(input, bays, {
    kind: 'visit-report',
    title: 'Visit report',
    about: visit.name,
    blocks: [
      ...opening(input, visit, seen, rules),
      ...actionBlocks(
        site,
        actions.filter(({ bayIds }) => bayIds.some((id) => ids.has(id))),
      ),
      heading('What was looked at'),
      checklistTable(seen),
      ...damageBlocks(input, seen, rules),
      ...sagBlocks(input, seen),
      ...plumbBlocks(input, seen),
      ...noticeBlocks(site, seen),
      ...noteBlocks(seen),
      ...closingBlocks(input, bays),
      { kind: 'sign-off', lines: signatures(visit) },
    ],
  });
}

const signatures = ({ signed }: Visit) => [
  { role: signed === null ? 'Visited by' : `Visited by${signed.role === '' ? '' : `, ${signed.role}`}`, signed },
  { role: 'Competent person', signed: null },
];

function opening(input: PaperInput, visit: Visit, seen: readonly Seen[], rules: ResolvedRules): readonly Block[] {
  const open = visit.bays.filter(({ finished }) => !finished).length;
  const gone = visit.bays.length - seen.length;
  const classes = new Map<DamageClass, number>();
  for (const { damage, judged } of damagesOf(seen, rules, input.today)) {
    const found = damage.on === 'frame' ? judged.class : 'red';
    classes.set(found, (classes.get(found) ?? 0) + 1);
  }
  const counts = (['red', 'unclassed', 'amber', 'green'] as const)
    .filter((one) => classes.has(one))
    .map((one) => `${classes.get(one)} ${DAMAGE_CLASS_WORDS[one].word.toLowerCase()}`);
  const locks = seen.reduce((sum, { seen: one }) => sum + one.missingLocks.length, 0);
  return [
    facts([
      fact('Kind of visit', [VISIT_KIND_WORDS[visit.kind].name]),
      fact('Visited by', [visit.person === '' ? 'not stated' : visit.person]),
      fact('Begun', dayCell(visit.started)),
      fact('Signed', [visit.signed === null ? 'not yet' : `${visit.signed.person}, ${dateWords(visit.signed.date)}`]),
      fact('Bays', [`${visit.bays.length}${open > 0 ? `, ${open} of them not finished` : ''}`]),
      fact('Damages', [counts.length === 0 ? 'none seen' : counts.join(', ')]),
      fact('Missing locks', [String(locks)]),
    ]),
    ...(open > 0
      ? [
          paragraph(
            say`This visit is not finished: ${counted(open, 'bay')} will still be looked at. That nothing is said of them here does not mean that they are in order.`,
          ),
        ]
      : []),
    ...(gone > 0 ? [paragraph(say`${counted(gone, 'bay')} of this visit are no longer part of the site.`)] : []),
  ];
}

const SHORT: Readonly<Record<BayVisit['checklist'][(typeof CHECKLIST)[number]], string>> = {
  yes: 'yes',
  no: 'NO',
  'not-looked-at': '–',
};

function checklistTable(seen: readonly Seen[]): Block {
  return table(
    'Answers by bay: “yes” = as it must be, “–” = not looked at',
    ['Bay', ...CHECKLIST.map((item) => CHECKLIST_WORDS[item].name), 'By', 'On'],
    seen.map(({ bay, seen: one }) => [
      [bay.name],
      ...CHECKLIST.map((item): Cell => [SHORT[one.checklist[item]]]),
      one.finished ? [one.person] : ['not finished'],
      one.finished ? dayCell(one.date) : NONE,
    ]),
  );
}

interface JudgedDamage extends Seen {
  readonly damage: BayVisit['damages'][number];
  readonly judged: DamageJudged;
}

/** Beam damage is no matter of millimetres: it is judged as torn. */
function damagesOf(seen: readonly Seen[], rules: ResolvedRules, today: string): readonly JudgedDamage[] {
  return seen.flatMap((at) =>
    at.seen.damages.map((damage) => ({
      ...at,
      damage,
      judged: classOfDamage(
        damage.on === 'frame'
          ? damage
          : { id: damage.id, member: 'upright-front', alongMm: null, acrossMm: null, gaugeMm: 1000, torn: true, found: damage.found },
        rules,
        today,
      ),
    })),
  );
}

function damageBlocks(input: PaperInput, seen: readonly Seen[], rules: ResolvedRules): readonly Block[] {
  const all = damagesOf(seen, rules, input.today);
  if (all.length === 0) return [heading('Damage'), paragraph(['No damage was seen.'])];
  const sources = (['damageUprightAlong', 'damageUprightAcross', 'damageBracing', 'damageRedFactor', 'amberWeeks'] as const).map((key) =>
    sourceOf(rules, key),
  );
  const notes = all.filter(({ damage }) => damage.note !== '');
  return [
    heading('Damage'),
    table(
      'Bow measured over the gauge length, each direction against its own limit',
      ['Bay', 'Part', '#Along the run', '#In the frame’s plane', '#Gauge', 'Times the limit', 'Class', 'Found', 'Amber until'],
      all.map(({ run, bay, damage, judged }) => {
        const until = judged.lastAmberDay === null ? NONE : dayCell(judged.lastAmberDay);
        if (damage.on === 'beam')
          return [
            [bay.name],
            [`${BEAM_MEMBER_WORDS[damage.member]}, ${levelTitle(bay, damage.levelId).toLowerCase()}, ${damage.beam}`],
            NONE,
            NONE,
            NONE,
            ['dent or tear'],
            { damage: judged.class },
            dayCell(damage.found),
            until,
          ];
        const frame = run.frames.find(({ id }) => id === damage.frameId);
        return [
          [bay.name],
          [`${FRAME_MEMBER_WORDS[damage.member]}, frame ${frame?.name ?? damage.frameId}`],
          measured(damage, damage.alongMm),
          measured(damage, damage.acrossMm),
          mmCell(damage.gaugeMm),
          ratios(damage, judged),
          { damage: judged.class },
          dayCell(damage.found),
          until,
        ];
      }),
    ),
    ...list(notes.map(({ bay, damage }) => say`Bay ${bay.name}: ${damage.note}`)),
    remark(say`Limits: ${[...new Set(sources)].join('; ')}. A competent person confirms every class.`),
  ];
}

const measured = ({ torn }: FrameDamage, mm: number | null): Text => (mm === null ? (torn ? NONE : ['not measured']) : [lengthOf(mm)]);

/** "1.6 along, 1.33 across". */
function ratios({ torn }: FrameDamage, { bends }: DamageJudged): Text {
  if (torn) return ['dent or tear'];
  const shown = bends.filter(({ ratio }) => Number.isFinite(ratio));
  if (shown.length === 0) return NONE;
  return shown.flatMap(({ direction, ratio }, i) => [...(i === 0 ? [] : [', ']), ratioOf(ratio), `\u00a0${direction}`]);
}

function levelAuditOf(input: PaperInput, levelId: Id): LevelAudit | null {
  for (const run of input.audit.runs)
    for (const bay of run.bays) for (const level of bay.levels) if (level.levelId === levelId) return level;
  return null;
}

function sagBlocks(input: PaperInput, seen: readonly Seen[]): readonly Block[] {
  const readings = seen.flatMap((at) => at.seen.sags.map((reading) => ({ ...at, reading, judged: judgedSag(input, reading) })));
  if (readings.length === 0) return [];
  return [
    heading('Sag of beams'),
    table(
      'Measured at mid-span from a line through the beam’s ends',
      ['Bay', 'Beam', '#Loaded', '#Unloaded', '#Sideways', '#Allowed', '#Set, of allowed', 'Verdict'],
      readings.map(({ bay, reading, judged }) => [
        [bay.name],
        [`${levelTitle(bay, reading.levelId)}, ${reading.beam}`],
        read(reading.loadedMm),
        read(reading.unloadedMm),
        read(reading.sidewaysMm),
        mmCell(judged?.limitMm),
        judged === null || judged.setPercent === null ? NONE : say`${quantity('percent', judged.setPercent)}`,
        { verdict: judged?.verdict ?? 'not-assessable' },
      ]),
    ),
    ...readings.flatMap(({ bay, reading, judged }): readonly Block[] =>
      judged === null
        ? [
            remark(
              say`The span of ${levelTitle(bay, reading.levelId).toLowerCase()} of bay ${bay.name} is not known, so its sag cannot be judged.`,
            ),
          ]
        : [
            subheading(`${levelTitle(bay, reading.levelId)} of bay ${bay.name}, ${reading.beam} beam`),
            ...judged.says.map((text) => paragraph(text)),
            ...list([...judged.missing.map(({ input: what, how }) => say`Not known: ${what}. ${how}`), ...judged.notes]),
            { kind: 'worked', steps: judged.worked },
          ],
    ),
  ];
}

const read = (mm: number | null): Text => (mm === null ? ['not read'] : [lengthOf(mm)]);

function judgedSag(input: PaperInput, reading: SagReading) {
  const audit = levelAuditOf(input, reading.levelId);
  return audit === null ? null : judgeSagOfLevel(input.site, audit, reading);
}

function plumbBlocks(input: PaperInput, seen: readonly Seen[]): readonly Block[] {
  const readings = seen.flatMap(({ run, seen: one }) => one.plumb.map((reading) => ({ run, reading })));
  if (readings.length === 0) return [];
  const verdicts = new Map(
    input.audit.runs.flatMap((run) =>
      run.frames.map((frame) => [frame.frameId, frame.findings.find(({ check }) => check === 'plumb')?.verdict] as const),
    ),
  );
  return [
    heading('Plumb'),
    table(
      'Offset of the upright at the height of the reading',
      ['Frame', '#Along the run', '#Across', '#Height', 'Loaded', 'Verdict'],
      readings.map(({ run, reading }) => [
        [run.frames.find(({ id }) => id === reading.frameId)?.name ?? reading.frameId],
        mmCell(reading.alongMm),
        mmCell(reading.acrossMm),
        mmCell(reading.heightMm),
        [reading.loaded ? 'yes' : 'no'],
        { verdict: verdicts.get(reading.frameId) ?? 'not-assessable' },
      ]),
    ),
  ];
}

function noticeBlocks(site: Site, seen: readonly Seen[]): readonly Block[] {
  const items = seen.flatMap(({ bay, seen: one }) =>
    noticeDiffers(site.notices.find(({ id }) => id === bay.noticeId) ?? null, bay, one.notice),
  );
  const notes = seen
    .filter(({ seen: one }) => one.notice.note !== '')
    .map(({ bay, seen: one }) => say`Bay ${bay.name}: ${one.notice.note}`);
  if (items.length + notes.length === 0) return [];
  return [heading('Load notices against the rack'), ...list([...items, ...notes])];
}

function noteBlocks(seen: readonly Seen[]): readonly Block[] {
  const notes = seen.filter(({ seen: one }) => one.notes.trim() !== '').map(({ bay, seen: one }) => say`Bay ${bay.name}: ${one.notes}`);
  const photos = seen.flatMap(({ bay, seen: one }) =>
    one.photos.map((photo) => ({
      file: photo.file,
      says: `Bay ${bay.name}${photo.note === '' ? '' : `: ${photo.note}`} (${photo.original}${photo.taken === '' ? '' : `, ${unbroken(dateWords(photo.taken.slice(0, 10)))}`})`,
    })),
  );
  return [
    ...(notes.length === 0 ? [] : [heading('Notes'), ...list(notes)]),
    ...(photos.length === 0 ? [] : [heading('Photos'), { kind: 'photos' as const, photos }]),
  ];
}

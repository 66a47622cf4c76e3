/** What every paper is made from, and the foot and closing parts that all of them share. */
import type { NotChecked, RunAudit, SiteAudit } from '../audit/types';
import { sourceWords } from '../audit/source-words';
import { resolveRules, RULE_KEYS, RULE_SET_TITLES, sourceOf } from '../checks/rule-sets';
import { RULES } from '../checks/rule-table';
import type { Bay, Frame, Id, Run, Site, Source } from '../site/site';
import { ratioOf } from '../units/quantity';
import { say } from '../units/text';
import { FOOTER_CAUTIONS } from '../words/cautions';
import { CHECK_WORDS } from '../words/check-names';
import { facts, fact, heading, list, table, type Block, type Foot, type Paper } from './paper';

export interface PaperInput {
  readonly site: Site;
  readonly audit: SiteAudit;
  /** SHA-256 of the site, hexadecimal. */
  readonly checksum: string;
  readonly program: string;
  /** ISO day. */
  readonly today: string;
  readonly person: string;
}

/** About so many letters stand in two lines of the foot. */
const FOOT_LETTERS = 260;

/** One rating's name and source may be longer than all lines of the foot. */
const PART_LETTERS = 150;

/** @param bays that the paper is about; every bay of the site where it is about all */
export function footOf(input: PaperInput, bays: readonly Bay[]): Foot {
  const { site, checksum, program, today, person } = input;
  const { rules } = site;
  return {
    site: site.name,
    checksum,
    program,
    date: today,
    person,
    ruleSet: `${RULE_SET_TITLES[rules.set]}${rules.changed.length === 0 ? '' : `, ${counted(rules.changed.length, 'value')} changed by this site`}`,
    span: spanWords(site),
    ratings: shortened(
      ratingsOf(site, bays).map(({ name, source }) => `${name} (${source})`),
      'No rating is entered.',
    ),
    notChecked: shortened(
      site.rules.leftOut.map(({ check }) => CHECK_WORDS[check].name),
      'No check is left out.',
    ),
    cautions: FOOTER_CAUTIONS,
  };
}

export const spanWords = ({ rules }: Site): string =>
  rules.span === 'clear-entry' ? 'clear entry between uprights' : 'upright centre to upright centre';

/** As many as have room; the rest is counted, and stands in the part on sources. */
function shortened(all: readonly string[], none: string): string {
  if (all.length === 0) return none;
  const parts = all.map((part) => (part.length > PART_LETTERS ? `${part.slice(0, PART_LETTERS - 1)}…` : part));
  let text = parts[0] ?? '';
  for (let i = 1; i < parts.length; i++) {
    const longer = `${text}; ${parts[i]}`;
    const rest = ` and ${parts.length - i} more, listed in this paper`;
    if (longer.length + rest.length > FOOT_LETTERS && !(i === parts.length - 1 && longer.length <= FOOT_LETTERS)) return text + rest;
    text = longer;
  }
  return text;
}

export const counted = (count: number, noun: string): string => `${count} ${noun}${count === 1 ? '' : 's'}`;

interface Rating {
  readonly name: string;
  readonly source: string;
}

/** Every notice, beam type and frame type that the bays and their frames rest on. */
function ratingsOf(site: Site, bays: readonly Bay[]): readonly Rating[] {
  const notices = new Set<Id | null>();
  const beams = new Set<Id | null>();
  const frames = new Set<Id | null>();
  const floors = new Set<Id | null>();
  const wanted = new Set(bays);
  for (const run of site.runs) {
    run.bays.forEach((bay, index) => {
      if (!wanted.has(bay)) return;
      notices.add(bay.noticeId);
      floors.add(run.floorId);
      for (const { beamTypeId } of bay.levels) beams.add(beamTypeId);
      for (const frame of [run.frames[index], run.frames[index + 1]]) frames.add(frame?.typeId ?? null);
    });
  }
  const named = (noun: string, all: readonly { id: Id; name: string; source: Source }[], ids: ReadonlySet<Id | null>): Rating[] =>
    all.filter(({ id }) => ids.has(id)).map(({ name, source }) => ({ name: `${noun} ${name}`, source: sourceWords(source) }));
  return [
    ...named('load notice', site.notices, notices),
    ...named('beam type', site.beamTypes, beams),
    ...named('frame type', site.frameTypes, frames),
    ...named('floor', site.floors, floors),
  ];
}

/** Rules, sources, what is not checked, and all cautions: what closes every paper with figures in it. */
export function closingBlocks(
  input: PaperInput,
  bays: readonly Bay[],
  notChecked: readonly NotChecked[] = input.site.rules.leftOut,
): readonly Block[] {
  const { site } = input;
  const rules = resolveRules(site.rules);
  const changed = RULE_KEYS.filter((key) => rules.changed[key] !== undefined);
  const ratings = ratingsOf(site, bays);
  return [
    heading('Assumptions and sources'),
    facts([
      fact('Rule set', [RULE_SET_TITLES[site.rules.set]]),
      fact('Beam span', [spanWords(site)]),
      fact('Loads', ['as stated, pallets included, without load factors: ratings are for loads in service']),
      fact('Own mass', ['of beams, decks and frames where it is known; it counts for frames and floor']),
      fact('Beam ends', ['pinned, or with the connector’s stiffness where that is known']),
      fact('Designed full complement', [
        site.rules.fullComplement
          ? 'judged by its total and its unit loads, with the equivalent uniform load as information'
          : 'not treated apart: every level is judged by its equivalent uniform load',
      ]),
      fact('Frame tables', [
        site.rules.frameTable === 'interpolate' ? 'interpolated between rows; never beyond an end' : 'next taller row; never beyond an end',
      ]),
      fact('“Close” begins', say`above ${ratioOf(rules.value.closeAbove)} used`),
      fact('Two amber damages on one frame', [site.rules.twoAmbersMakeRed ? 'count as red' : 'stay amber']),
      fact('Site checksum (SHA-256)', [input.checksum]),
    ]),
    ...(ratings.length === 0
      ? []
      : [
          table(
            'Where the ratings come from',
            ['Rating', 'Source'],
            ratings.map(({ name, source }) => [[name], [source]]),
          ),
        ]),
    ...(changed.length === 0
      ? []
      : [
          table(
            'Rules changed by this site',
            ['Rule', '#Value', 'Why'],
            changed.map((key) => [[RULES[key].label], [{ value: rules.value[key], kind: RULES[key].kind }], [sourceOf(rules, key)]]),
          ),
        ]),
    heading('Not checked'),
    ...(notChecked.length === 0
      ? list([['No check of this program is left out.'], ['Never covered: earthquake, wind, impact, fire, fatigue, anchors, slab design.']])
      : [
          table(
            'Checks left out by this site',
            ['Check', 'Why'],
            notChecked.map(({ check, reason }) => [[CHECK_WORDS[check].name], [reason]]),
          ),
          ...list([['Never covered: earthquake, wind, impact, fire, fatigue, anchors, slab design.']]),
        ]),
    { kind: 'cautions' },
  ];
}

export const paperOf = (
  input: PaperInput,
  bays: readonly Bay[],
  parts: Pick<Paper, 'kind' | 'title' | 'about' | 'blocks'> & { readonly wide?: boolean },
): Paper => ({ ...parts, wide: parts.wide ?? false, foot: footOf(input, bays) });

/** @throws RangeError if the audit does not have the run */
export function runAuditOf({ audit }: PaperInput, runId: Id): RunAudit {
  const found = audit.runs.find((one) => one.runId === runId);
  if (found === undefined) throw new RangeError(`the audit has no run "${runId}"`);
  return found;
}

/** "between bays A1 and A2", "left of bay A1". */
export function frameStands(run: Run, frame: Frame): string {
  const index = run.frames.indexOf(frame);
  const left = run.bays[index - 1];
  const right = run.bays[index];
  if (left && right) return `between bays ${left.name} and ${right.name}`;
  return left ? `right of bay ${left.name}` : right ? `left of bay ${right.name}` : 'by itself';
}

/**
 * The site being edited: its value and history, what is selected, its findings, and whether it is
 * on disk. Every part of the page reads this and changes the site only through it.
 */
import { createContext } from 'svelte';
import type { FrameAudit, LevelAudit, RunAudit } from '../../src-core/audit/types';
import type { Host } from '../../src-core/host';
import type { Id, Level, Placement, Site } from '../../src-core/site/site';
import { formatQuantity, type Reading } from '../../src-core/units/format';
import { lengthOf, type UnitSystem } from '../../src-core/units/quantity';
import { VERDICT_WORDS } from '../../src-core/words/verdict-words';
import type { WorkerLike } from '../auditing/audit-link';
import { Findings } from '../auditing/findings.svelte';
import { nameOfPlace, placementPlace, type Target } from '../editing/places';
import type { Neighbour } from '../editing/neighbours';
import { allMoved, moved, putDown, type Move } from '../editing/put-down';
import { refusal, type Refused } from './refusal';
import { Saving, type SavedState } from './saving.svelte';
import { completed, existing, firstOf, NOTHING, type Selection } from './selection';
import { choiceFor, followed, formFor, taskOfField, type Task } from './tasks';
import { todayHere } from './today';
import { Typed } from './typed.svelte';
import { amend, record, redo, startHistory, undo, type UndoHistory } from './undo-history';

export type { Target } from '../editing/places';
export type { Selection } from './selection';

export interface OpenSiteOptions {
  readonly host: Host;
  readonly id: string;
  readonly site: Site;
  readonly revision: string | null;
  readonly savedAt: string | null;
  readonly locale?: string;
  /** Null where there are no workers: the audit then runs at once. */
  readonly makeWorker?: (() => WorkerLike) | null;
  /** ISO date of today. */
  readonly today?: () => string;
  /** Told of every form that is asked for, so that the screen it stands on comes up. */
  readonly onTask?: (task: Task) => void;
}

export class OpenSite {
  readonly id: string;
  readonly saving: Saving;
  readonly findings: Findings;
  /** The unit load picked up by click or key that waits for its target. */
  carried = $state<Id | null>(null);
  /** Whether goods push their neighbours apart where they are put down; else they are refused where they would stand in others. */
  pushing = $state(false);
  /** Why goods were not put where they were to go, beside the drawing until the next change; null where nothing was refused. */
  refusedMove = $state<string | null>(null);
  task = $state.raw<Task | null>(null);
  /** The form that was last asked for, to be given the focus. */
  asked = $state.raw<Task | null>(null);
  /** What the status region says. */
  said = $state('');
  viewUnits = $state<UnitSystem | null>(null);
  locale = $state('en-GB');
  /** What was last put on a level, to be offered first. */
  lastGoods: Id | null = null;
  copied: readonly Omit<Placement, 'id'>[] = [];
  /** A level that was copied whole, after any goods; null where goods were copied last. */
  copiedLevel = $state.raw<Level | null>(null);
  /** The bay template last kept or laid out by, to be offered first. */
  lastTemplate: Id | null = null;
  /** ISO date of today. */
  readonly today: () => string;
  /** What is typed into forms and not taken over yet. */
  readonly typed = new Typed();

  #history = $state.raw<UndoHistory<Site>>() as UndoHistory<Site>;
  /** A change that is shown and checked but not made yet, while something is dragged or carried. */
  #trial = $state.raw<Site | null>(null);
  #tried: readonly Move[] | null = null;
  #wanted = $state.raw<Selection>(NOTHING);
  /** Where one was before, for going back. */
  #trail = $state.raw<readonly Selection[]>([]);
  #lastMerge: { key: string; at: number } | null = null;
  #onTask: (task: Task) => void;

  /** The site as it is shown: with the trial move, where one is going on. */
  site = $derived(this.#trial ?? this.#history.value);
  /** What is selected and still exists. */
  selection = $derived(existing(this.site, this.#wanted));
  canUndo = $derived(this.#history.past.length > 0);
  canGoBack = $derived(this.#trail.length > 0);
  canRedo = $derived(this.#history.future.length > 0);
  /** Name of the edit that undo would take back. */
  undoName = $derived(this.#history.past.at(-1)?.name ?? null);
  redoName = $derived(this.#history.future[0]?.name ?? null);
  steps = $derived(this.#history.past.length);
  saved = $derived.by((): SavedState => this.saving.stateOf(this.#history.value));
  reading = $derived<Reading>({ units: this.viewUnits ?? this.site.units, locale: this.locale });
  run = $derived(this.site.runs.find((run) => run.id === this.selection.runId) ?? null);
  bay = $derived(this.run?.bays.find((bay) => bay.id === this.selection.bayId) ?? null);
  level = $derived(this.bay?.levels.find((level) => level.id === this.selection.levelId) ?? null);
  #near = $derived.by(() => this.findings.near(this.site, this.run, this.bay));
  /** The chosen bay with every calculation, of the site as it is shown. */
  bayAudit = $derived(this.#near.bay);
  levelAudit = $derived<LevelAudit | null>(this.bayAudit?.levels.find((level) => level.levelId === this.selection.levelId) ?? null);
  /** The chosen run: the chosen bay and its frames with every calculation, the others with their verdicts and sentences. */
  runAudit = $derived.by(() => this.findings.run(this.selection.runId, this.#near));

  constructor(options: OpenSiteOptions) {
    this.id = options.id;
    this.#history = startHistory(options.site);
    this.locale = options.locale ?? 'en-GB';
    this.today = options.today ?? todayHere;
    this.#onTask = options.onTask ?? (() => undefined);
    this.findings = new Findings(options.makeWorker ?? null, this.today);
    this.saving = new Saving({
      host: options.host,
      id: options.id,
      revision: options.revision,
      savedAt: options.savedAt,
      onDisk: options.revision === null ? null : options.site,
      write: (site) => this.findings.write(site),
    });
    this.findings.follow(options.site);
    this.#wanted = firstOf(options.site);
  }

  // ------------------------------------------------------------ looking

  /** Selects; what is named brings its run, bay and level along, and takes the rest back. */
  select = (part: Partial<Selection>): void => {
    const before = this.selection;
    this.#wanted = completed(this.site, before, part);
    this.refusedMove = null;
    if (before.bayId !== null && this.selection.bayId !== before.bayId) this.#trail = [...this.#trail.slice(-99), before];
    if (this.task !== null) this.task = followed(this.task, this.selection);
    if (this.carried !== null && part.placementIds && !part.placementIds.includes(this.carried)) this.putBack();
  };

  /** What was selected as it was taken out, to be selected again when undo brings it back. */
  #takenOut: { readonly wanted: Selection; readonly steps: number } | null = null;
  /** What the focus goes to now that what had it is gone; asked anew each time. */
  goingOn = $state.raw<Neighbour['focus'] | null>(null);

  /** Chooses what is left beside something that was taken out, and brings the focus there. */
  goOnTo = (neighbour: Neighbour | null): void => {
    if (neighbour === null) return;
    this.#takenOut = { wanted: this.#wanted, steps: this.steps };
    this.select(neighbour.select);
    this.goingOn = { ...neighbour.focus };
  };

  /** Findings of every run by its id, without their calculations. A new run has none until the audit has seen it. */
  get audits(): ReadonlyMap<Id, RunAudit> {
    return this.findings.audits;
  }

  /** Runs whose audit broke down, with what it said. */
  get auditTroubles(): ReadonlyMap<Id, string> {
    return this.findings.troublesWith(this.run, this.#near);
  }

  /** True while findings of some run are older than the site. */
  get auditing(): boolean {
    return this.findings.auditing;
  }

  frameAudit = (frameId: Id): FrameAudit | null =>
    this.#near.frames.find((frame) => frame.frameId === frameId) ?? this.findings.frame(frameId);

  /** Back to the bay one came from. */
  goBack = (): void => {
    const last = this.#trail.at(-1);
    if (last === undefined) return;
    this.#trail = this.#trail.slice(0, -1);
    this.#wanted = last;
    this.sayWhere();
  };

  switchUnits = (): void => {
    this.viewUnits = this.reading.units === 'metric' ? 'us' : 'metric';
    this.say(this.viewUnits === 'us' ? 'Shown in pounds and inches.' : 'Shown in kilograms and millimetres.');
  };

  sayWhere = (): void => {
    const { run, bay, level } = this;
    if (run === null || bay === null) return;
    const audit = level === null ? this.bayAudit : this.levelAudit;
    const verdict = audit === null ? '' : ` ${VERDICT_WORDS[audit.verdict].word}.`;
    this.say(`Run ${run.name}, ${nameOfPlace(bay, level)}.${verdict}`);
  };

  say = (text: string): void => {
    // The same words twice are said twice only if the text differs.
    this.said = text === this.said ? `${text}\u00a0` : text;
  };

  /** Says what was done here together with what it did to level and bay. */
  sayDone = (text: string): void => {
    const words = [text];
    if (this.levelAudit) words.push(`Level: ${VERDICT_WORDS[this.levelAudit.verdict].word.toLowerCase()}.`);
    if (this.bayAudit) words.push(`Bay: ${VERDICT_WORDS[this.bayAudit.verdict].word.toLowerCase()}.`);
    this.say(words.join(' '));
  };

  // ------------------------------------------------------------ changing

  /**
   * The one way in which the site changes. Edits with the same `merge` key within a second are one
   * step of undo, for nudges and typing.
   * @returns why the change was refused, as a sentence; null if it was made
   */
  edit = (name: string, change: (site: Site) => Site, merge: string | null = null): Refused | null => {
    this.dropTrial();
    const before = this.#history.value;
    let after: Site;
    try {
      after = change(before);
    } catch (error) {
      // The core refuses what could not stand in a site file, in a sentence for whoever typed it.
      if (!(error instanceof RangeError)) throw error;
      this.say(error.message);
      return refusal(error.message);
    }
    if (after === before) return null;
    const now = Date.now();
    const goesOn = merge !== null && this.#lastMerge?.key === merge && now - this.#lastMerge.at < 1000;
    // The value on disk stays a step of its own, or undo could not come back to it.
    this.#history = goesOn && before !== this.saving.onDisk ? amend(this.#history, after) : record(this.#history, name, after);
    this.#lastMerge = merge === null ? null : { key: merge, at: now };
    this.#changed(name);
    return null;
  };

  undo = (): void => {
    this.dropTrial();
    const name = this.undoName;
    if (name === null) return;
    if (this.#takenOut?.steps === this.steps) this.#wanted = this.#takenOut.wanted;
    this.#takenOut = null;
    this.#history = undo(this.#history);
    this.#lastMerge = null;
    this.#changed(`Undo: ${name}`);
    this.say(`Undone: ${name}.`);
  };

  redo = (): void => {
    this.dropTrial();
    const name = this.redoName;
    if (name === null) return;
    this.#history = redo(this.#history);
    this.#lastMerge = null;
    this.#changed(`Redo: ${name}`);
    this.say(`Done again: ${name}.`);
  };

  // ------------------------------------------------------------ moving goods

  /** The one command behind dragging, keys, clicks, the menu and typed places. */
  move = (placementId: Id, target: Target, merge?: string): Refused | null => {
    this.dropTrial();
    const from = placementPlace(this.site, placementId);
    if (from === null) return null;
    const refused = this.editGoods(
      `Move ${from.unitLoad.name}`,
      (site) => this.roomFor(moved(site, placementId, target), [placementId]),
      merge ?? null,
    );
    if (refused !== null) return refused;
    if (this.carried === placementId) this.carried = null;
    const to = placementPlace(this.site, placementId);
    if (to === null) return null;
    this.select({ runId: to.run.id, bayId: to.bay.id, levelId: to.level?.id ?? null, placementIds: [placementId] });
    const place = nameOfPlace(to.bay, to.level);
    const at = formatQuantity(lengthOf(to.placement.atMm), this.reading);
    this.sayDone(`${to.unitLoad.name} moved to ${place}, ${at} from the left upright.`);
    return null;
  };

  /** Several at once, as one step of undo. */
  moveAll = (moves: readonly Move[], merge?: string): Refused | null => {
    const placementIds = moves.map(({ placementId }) => placementId);
    const change = (site: Site) => this.roomFor(allMoved(site, moves), placementIds);
    const refused = this.editGoods(`Move ${moves.length} unit loads`, change, merge ?? null);
    if (refused === null) this.select({ placementIds });
    return refused;
  };

  /**
   * The site with goods just put down on it: neighbours pushed apart, where that is wanted.
   * @throws RangeError if they would stand in others
   */
  roomFor = (site: Site, placementIds: readonly Id[]): Site =>
    putDown({ before: this.#history.value, after: site, placementIds, pushing: this.pushing, reading: this.reading });

  /** An edit that puts goods down; why it was refused stays in sight beside the drawing. */
  editGoods = (name: string, change: (site: Site) => Site, merge: string | null = null): Refused | null => {
    const refused = this.edit(name, change, merge);
    this.refusedMove = refused;
    return refused;
  };

  /** Shows and checks a move without making it; `keepTrial` makes it, `dropTrial` takes it back. */
  tryMove = (placementId: Id, target: Target): void => this.tryMoves([{ placementId, target }]);

  /** The same for several that go together. */
  tryMoves = (moves: readonly Move[]): void => {
    const before = this.#history.value;
    const placementIds = moves.map(({ placementId }) => placementId);
    if (placementIds.some((id) => placementPlace(before, id) === null)) return;
    const there = allMoved(before, moves);
    this.#tried = moves;
    try {
      this.#trial = this.roomFor(there, placementIds);
    } catch (error) {
      // Shown where it is held; putting it down there says why it cannot stay.
      if (!(error instanceof RangeError)) throw error;
      this.#trial = there;
    }
  };

  /** Makes the move that was tried, exactly as `move` would have. */
  keepTrial = (): void => {
    const [first, ...others] = this.#tried ?? [];
    if (this.#trial === null || first === undefined) return;
    if (others.length === 0) this.move(first.placementId, first.target);
    else if (this.moveAll([first, ...others]) === null) this.sayDone(`${others.length + 1} unit loads moved.`);
  };

  /** Puts down what is carried where it was tried, or where it stood. */
  putDown = (): void => {
    if (this.carried === null) return;
    if (this.#trial === null) this.putBack();
    else this.keepTrial();
  };

  dropTrial = (): void => {
    this.#trial = null;
  };

  pickUp = (placementId: Id): void => {
    const found = placementPlace(this.site, placementId);
    if (found === null) return;
    this.carried = placementId;
    this.say(
      `${found.unitLoad.name} picked up. Choose a place with the arrow keys or by clicking, Enter puts it down, Escape puts it back.`,
    );
  };

  putBack = (): void => {
    this.dropTrial();
    if (this.carried === null) return;
    const found = placementPlace(this.site, this.carried);
    this.carried = null;
    if (found) this.say(`${found.unitLoad.name} put back.`);
  };

  // ------------------------------------------------------------ forms

  /** Opens the form that holds a field, named `kind:id:field` as findings name what is missing. */
  openField = (field: string): void => this.#open(taskOfField(field));

  openTask = (kind: string, id: Id): void => this.#open({ kind, id, field: null });

  #open(task: Task): void {
    const choice = choiceFor(task, this);
    if (choice !== null) this.select(choice);
    this.task = formFor(task, this.site);
    this.asked = this.task;
    this.#onTask(this.task);
  }

  closeTask = (): void => {
    this.task = null;
  };

  /** What was typed and not taken over, or filled in by half, by name. */
  get unfinished(): readonly string[] {
    return this.typed.unfinishedIn(this.site);
  }

  // ------------------------------------------------------------ disk

  save = async (): Promise<boolean> => {
    this.putBack();
    const done = await this.saving.save(this.#history.value);
    this.say(done ? 'All changes saved.' : `Not saved. ${this.saving.failure?.message ?? ''}`);
    return done;
  };

  close = (): void => {
    this.saving.close();
    this.findings.close();
  };

  #changed(name: string): void {
    this.refusedMove = null;
    this.findings.follow(this.#history.value);
    this.saving.edited(this.#history.value, name);
  }
}

export const [useOpenSite, setOpenSite] = createContext<OpenSite>();

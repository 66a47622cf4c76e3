/** Forms in the side panel: of what they are, and what is chosen together with them. */
import type { Bay, Id, Run, Site } from '../../src-core/site/site';
import { bayPlace, besideChosenBay, frameOfDamage, framePlace, levelPlace, placementPlace } from '../editing/places';
import type { Selection } from './selection';

/** What the side panel is asked to show, and the field in it that is to be filled. */
export interface Task {
  readonly kind: string;
  readonly id: Id;
  /** `kind:id:field`, whole; null where the form alone is wanted. */
  readonly field: string | null;
}

/** The form that holds a field, named `kind:id:field` as findings name what is missing. */
export function taskOfField(field: string): Task {
  const [kind = '', id = '', ...rest] = field.split(':');
  return { kind, id, field: rest.length > 0 ? field : null };
}

interface Chosen {
  readonly site: Site;
  readonly run: Run | null;
  readonly bay: Bay | null;
}

/** What is chosen, so that what the form is of is in sight; null where the choice stays. */
export function choiceFor({ kind, id }: Task, { site, run, bay }: Chosen): Partial<Selection> | null {
  const there = bayPlace(site, id);
  if (there) return { runId: there.run.id, bayId: id };
  if (levelPlace(site, id)) return { levelId: id };
  if (placementPlace(site, id)) return { placementIds: [id] };
  const frame = frameOf(kind, id, site);
  if (frame && !besideChosenBay(run, bay, frame.frame)) return { bayId: frame.run.bays[Math.max(0, frame.index - 1)]?.id ?? null };
  return kind === 'run' ? { runId: id } : null;
}

/** The form in which the task is done: a damage stands in that of its frame. */
export function formFor(task: Task, site: Site): Task {
  const frame = frameOf(task.kind, task.id, site);
  return frame ? { ...task, kind: 'frame', id: frame.frame.id } : task;
}

const frameOf = (kind: string, id: Id, site: Site) => (kind === 'damage' ? frameOfDamage(site, id) : framePlace(site, id));

/** Forms of bay and level stay with what is chosen; null where it has no such form. */
export function followed(task: Task, { bayId, levelId }: Selection): Task | null {
  const id = { level: levelId, bay: bayId, frames: bayId }[task.kind];
  if (id === null) return null;
  return id === undefined || id === task.id ? task : { kind: task.kind, id, field: null };
}

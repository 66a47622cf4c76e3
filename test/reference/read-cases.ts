/** Reads a file of beam reference cases, and says what is wrong with one that cannot be read. */
import type { Beam, BeamEnd } from '../../src-core/statics/beam';
import type { BeamLoad, LineLoad, PointLoad } from '../../src-core/statics/load';

export class UnreadableCases extends Error {}

export interface Tolerances {
  /** Parts of the resultant, of resultant × span / 8, of the greatest deflection, and of the span. */
  readonly forces: number;
  readonly moments: number;
  readonly deflections: number;
  readonly places: number;
}

export interface ReferenceCase {
  readonly id: string;
  readonly beam: Beam;
  readonly load: BeamLoad;
  readonly expect: Readonly<Record<string, unknown>>;
  /** Part of the span allowed for the place of the greatest moment, where it is ill-conditioned. */
  readonly loosePlaces: number | null;
}

export interface CaseFile {
  readonly title: string;
  readonly tolerances: Tolerances;
  readonly cases: readonly ReferenceCase[];
}

type Json = Readonly<Record<string, unknown>>;

const isRecord = (value: unknown): value is Json => typeof value === 'object' && value !== null && !Array.isArray(value);

export function readCases(text: string): CaseFile {
  let json: unknown;
  try {
    json = JSON.parse(text);
  } catch (error) {
    throw new UnreadableCases(`not JSON: ${error instanceof Error ? error.message : String(error)}`);
  }
  if (!isRecord(json) || !Array.isArray(json['cases'])) throw new UnreadableCases('no list "cases" in it');
  const conventions = isRecord(json['conventions']) ? json['conventions'] : {};
  const suggested = typeof conventions['suggestedTolerances'] === 'string' ? conventions['suggestedTolerances'] : '';
  return {
    title: typeof json['title'] === 'string' ? json['title'] : 'beam cases',
    tolerances: tolerancesIn(suggested),
    cases: json['cases'].map((one: unknown, index) => readCase(one, index, suggested)),
  };
}

/** The file says its tolerances in a sentence: "forces 1e-9*resultant_N, moments 1e-9*…". */
function tolerancesIn(sentence: string): Tolerances {
  const part = (word: string, standard: number): number => {
    const found = new RegExp(`${word}\\s+(\\d[\\d.]*e-?\\d+)`).exec(sentence)?.[1];
    return found === undefined ? standard : Number(found);
  };
  return {
    forces: part('forces', 1e-9),
    moments: part('moments', 1e-9),
    deflections: part('deflections', 1e-9),
    places: part('places', 1e-6),
  };
}

function readCase(value: unknown, index: number, suggested: string): ReferenceCase {
  const name = `case ${index + 1}`;
  if (!isRecord(value)) throw new UnreadableCases(`${name} is not an object`);
  const id = typeof value['id'] === 'string' ? value['id'] : name;
  const ends = recordIn(value, 'ends', id);
  const loads = value['loads'];
  if (!Array.isArray(loads)) throw new UnreadableCases(`${id}: "loads" is not a list`);
  const lines: LineLoad[] = [];
  const points: PointLoad[] = [];
  for (const [i, load] of loads.entries()) {
    const where = `${id}: load ${i + 1}`;
    if (!isRecord(load)) throw new UnreadableCases(`${where} is not an object`);
    if (load['kind'] === 'line')
      lines.push({
        from: numberIn(load, 'from_mm', where),
        to: numberIn(load, 'to_mm', where),
        wFrom: numberIn(load, 'wFrom_N_per_mm', where),
        wTo: numberIn(load, 'wTo_N_per_mm', where),
      });
    else if (load['kind'] === 'point') points.push({ at: numberIn(load, 'at_mm', where), force: numberIn(load, 'force_N', where) });
    else throw new UnreadableCases(`${where} is of kind ${JSON.stringify(load['kind'])}; "line" and "point" are known`);
  }
  return {
    id,
    beam: {
      span: numberIn(value, 'span_mm', id),
      rigidity: numberIn(value, 'EI_Nmm2', id),
      left: endIn(ends, 'left', id),
      right: endIn(ends, 'right', id),
    },
    load: { lines, points },
    expect: recordIn(value, 'expect', id),
    loosePlaces: loosePlaces(id, typeof value['note'] === 'string' ? value['note'] : '', suggested),
  };
}

const SPAN_PART = /(\d[\d.]*e-\d+)\s*\*\s*span/;

/** A place is looser only where the case's note, or the file's sentence by the case's id, says that it is ill-conditioned. */
function loosePlaces(id: string, note: string, suggested: string): number | null {
  const named = /ill-conditioned\s*\(([^)]*)\)/.exec(suggested)?.[1] ?? '';
  const inNote = /ill.conditioned|badly conditioned/i.test(note);
  const inSentence = new RegExp(`\\b${id}\\b`).test(named);
  if (!inNote && !inSentence) return null;
  return Number((inNote ? SPAN_PART.exec(note)?.[1] : undefined) ?? SPAN_PART.exec(named)?.[1] ?? 1e-3);
}

function endIn(ends: Json, side: 'left' | 'right', id: string): BeamEnd {
  const end = ends[side];
  if (end === 'pinned' || end === 'fixed') return { kind: end };
  if (isRecord(end)) return { kind: 'sprung', stiffness: numberIn(end, 'k_Nmm_per_rad', `${id}: ${side} end`) };
  throw new UnreadableCases(`${id}: ${side} end is ${JSON.stringify(end)}; "pinned", "fixed" and {"k_Nmm_per_rad": …} are known`);
}

function recordIn(value: Json, key: string, where: string): Json {
  const found = value[key];
  if (!isRecord(found)) throw new UnreadableCases(`${where}: "${key}" is not an object`);
  return found;
}

function numberIn(value: Json, key: string, where: string): number {
  const found = value[key];
  if (typeof found !== 'number') throw new UnreadableCases(`${where}: "${key}" is not a number but ${JSON.stringify(found)}`);
  return found;
}

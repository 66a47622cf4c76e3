/**
 * The rule set in force on a site: the numbers of one set with the site's own changes on top, each with
 * where it came from. Sets are not mixed: everything a site does not change comes from its one set.
 */
import type { Quantity } from '../units/quantity';
import type { WorkedValue } from './finding';
import { RULES, type Mark } from './rule-table';

export type RuleSetName = 'european' | 'united-states' | 'australian';
export type RuleKey = keyof typeof RULES;

export const RULE_SET_TITLES: Readonly<Record<RuleSetName, string>> = {
  european: 'European',
  'united-states': 'United States',
  australian: 'Australian',
};

export const RULE_KEYS = Object.keys(RULES) as readonly RuleKey[];

/** A site's choice: the set, and what it changes with the reason. */
export interface RuleChoice {
  readonly set: RuleSetName;
  readonly changed: readonly { readonly key: RuleKey; readonly value: number; readonly reason: string }[];
}

/** The numbers in force, as plain data. `value` in the core's unit of the rule's kind. */
export interface ResolvedRules {
  readonly set: RuleSetName;
  readonly value: Readonly<Record<RuleKey, number>>;
  /** Reasons of the changed ones; a key that is missing is as the set has it. */
  readonly changed: Readonly<Partial<Record<RuleKey, string>>>;
}

/**
 * @throws RangeError if a changed value is outside what its rule allows
 */
export function resolveRules(choice: RuleChoice): ResolvedRules {
  const value = {} as Record<RuleKey, number>;
  for (const key of RULE_KEYS) value[key] = RULES[key][choice.set].value;
  const changed: Partial<Record<RuleKey, string>> = {};
  for (const change of choice.changed) {
    const { least, most } = RULES[change.key];
    if (!(change.value >= least && change.value <= most)) {
      throw new RangeError(`rule ${change.key} must be from ${least} to ${most}, got ${change.value}`);
    }
    value[change.key] = change.value;
    changed[change.key] = change.reason;
  }
  return { set: choice.set, value, changed };
}

/** How far the number in force can be trusted; a changed one answers for itself. */
export const markOf = (rules: ResolvedRules, key: RuleKey): Mark | 'changed' =>
  rules.changed[key] === undefined ? RULES[key][rules.set].mark : 'changed';

/** Where the number in force came from, as one phrase with its mark and the rule set's name. */
export function sourceOf(rules: ResolvedRules, key: RuleKey): string {
  const title = `${RULE_SET_TITLES[rules.set]} rule set`;
  const reason = rules.changed[key];
  if (reason !== undefined) return `changed from the ${title}: ${reason.trim() || 'no reason given'}`;
  const { mark, text } = RULES[key][rules.set];
  if (mark === 'source') return `${title}; ${text}`;
  return mark === 'common practice' ? `${title}; common practice, ${text}` : `${title}; from memory of ${text}; to be confirmed`;
}

export const ruleQuantity = (rules: ResolvedRules, key: RuleKey): Quantity => ({ value: rules.value[key], kind: RULES[key].kind });

/** A number of the rule set as it goes into a worked calculation. */
export const ruleValue = (rules: ResolvedRules, key: RuleKey, symbol: string): WorkedValue => ({
  symbol,
  is: RULES[key].label,
  quantity: ruleQuantity(rules, key),
  from: sourceOf(rules, key),
});

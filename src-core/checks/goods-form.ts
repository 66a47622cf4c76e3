/** Whether goods can lean over, roll away, or press through on rims, wheels or feet. */
import { lengthOf, quantity } from '../units/quantity';
import { say, type Finding, type Missing, type Place, type Text, type WorkedStep } from './finding';
import { finding, notAssessable } from './make-finding';
import { inside } from './phrase';
import { TOUCH } from './placement';
import { ruleQuantity, ruleValue, sourceOf, type ResolvedRules } from './rule-sets';
import { above, put } from './worked-values';

type Contact = 'flat' | 'rims' | 'wheels' | 'feet' | 'lying-round';

export interface FormedGoods {
  readonly placementId: string;
  readonly name: string;
  readonly height: number;
  /** Offset of the top, mm, to either side. */
  readonly lean: number;
  readonly contact: Contact;
  readonly chocked: 'yes' | 'no' | 'unknown';
  /** What to answer where it is not known whether they are chocked. */
  readonly missing: Missing;
  /** Whether a pallet spreads what they stand on. */
  readonly onPallet: boolean;
}

export interface GoodsFormInput {
  readonly place: Place;
  readonly level: string;
  readonly goods: readonly FormedGoods[];
  /** "floor" where the goods stand on the floor of the bay. */
  readonly deck: 'none' | 'support-bars' | 'mesh' | 'panels' | 'floor';
  readonly rules: ResolvedRules;
}

/** One finding for each trouble; one that says there is none. */
export function goodsForm(input: GoodsFormInput): readonly Finding[] {
  const found = input.goods.flatMap((one) => [...rolling(input, one), ...pressing(input, one), ...leaning(input, one)]);
  if (found.length > 0) return found;
  const { goods, level, place } = input;
  return [
    finding({
      check: 'goods-form',
      place,
      verdict: 'within',
      says: () =>
        goods.length === 0
          ? say`No goods stand on ${inside(level)}.`
          : say`Nothing on ${inside(level)} leans too far, can roll, or stands on rims, wheels or feet that need a deck.`,
    }),
  ];
}

const at = ({ place }: GoodsFormInput, { placementId }: FormedGoods): Place => ({ ...place, placementId });

function rolling(input: GoodsFormInput, goods: FormedGoods): readonly Finding[] {
  if (goods.contact !== 'lying-round' || goods.chocked === 'yes') return [];
  if (goods.chocked === 'unknown') return [notAssessable('goods-form', at(input, goods), [goods.missing])];
  return [
    finding({
      check: 'goods-form',
      place: at(input, goods),
      verdict: 'over',
      says: () => say`${goods.name} lies round and is not chocked: it can roll off. Cradle or chock it, or take it down.`,
      notes: () => [
        say`Drums, coils, pipes and reels have rolled and toppled with fatal outcome; chocks and cradles also turn their push sideways into a rest.`,
      ],
    }),
  ];
}

/** Goods without a pallet on what does not make a surface. */
function pressing(input: GoodsFormInput, goods: FormedGoods): readonly Finding[] {
  const { deck } = input;
  if (goods.contact === 'flat' || goods.onPallet || deck === 'floor') return [];
  const stands = STANDS[goods.contact];
  if (deck === 'mesh' || deck === 'panels')
    return [
      finding({
        check: 'goods-form',
        place: at(input, goods),
        verdict: 'close',
        says: () =>
          say`${goods.name} ${stands} on a deck. A deck’s rating is for load spread evenly and at rest: this is outside it. Put a board or a pallet under it, or ask the deck’s maker.`,
        notes: () => [
          say`Rating of decks: ANSI MH26.2 as restated (secondary): evenly spread static load; point and line loads are excluded.`,
        ],
      }),
    ];
  // Feet may stand on the beams themselves: their places are in the goods' bearing.
  if (goods.contact === 'feet') return [];
  return [
    finding({
      check: 'goods-form',
      place: at(input, goods),
      verdict: 'over',
      says: () =>
        say`${goods.name} ${stands} and has neither a pallet nor a deck under it: beams do not hold it. Put it on a pallet, or fit a deck.`,
    }),
  ];
}

const STANDS: Readonly<Record<Exclude<Contact, 'flat'>, string>> = {
  rims: 'stands on its rims',
  wheels: 'stands on wheels',
  feet: 'stands on small feet',
  'lying-round': 'lies on a line',
};

function leaning(input: GoodsFormInput, goods: FormedGoods): readonly Finding[] {
  const { rules } = input;
  const lean = Math.abs(goods.lean);
  const allowed = (rules.value.leanMost / 100) * goods.height;
  if (lean <= allowed * (1 + 1e-12)) return [];
  const leans = quantity('percent', (100 * lean) / goods.height);
  return [
    finding({
      check: 'goods-form',
      place: at(input, goods),
      verdict: 'over',
      demand: lengthOf(lean),
      allowed: lengthOf(allowed),
      ...(allowed > TOUCH ? { utilisation: lean / allowed } : {}),
      says: (): Text =>
        say`${goods.name} leans ${lengthOf(lean)}, ${leans} of its height; up to ${ruleQuantity(rules, 'leanMost')} counts as upright. Take it down and stack it anew.`,
      worked: (): readonly WorkedStep[] =>
        allowed > TOUCH
          ? [
              {
                what: 'Greatest lean',
                formula: 'p / 100 · h',
                values: [ruleValue(rules, 'leanMost', 'p'), put('h', 'height of the goods', lengthOf(goods.height), 'goods')],
                result: { symbol: 'l_most', quantity: lengthOf(allowed) },
                source: sourceOf(rules, 'leanMost'),
              },
              {
                what: 'Over the limit',
                formula: 'l / l_most',
                values: [put('l', 'lean', lengthOf(lean), 'goods'), above('l_most', 'greatest lean', lengthOf(allowed))],
                result: { symbol: 'u', quantity: { value: lean / allowed, kind: 'ratio' } },
                source: sourceOf(rules, 'leanMost'),
              },
            ]
          : [],
      notes: () => [say`Limit: ${sourceOf(rules, 'leanMost')}.`],
    }),
  ];
}

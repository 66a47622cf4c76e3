/**
 * What stands on every result and every page of print. All eighteen are shown where there is room;
 * `FOOTER_CAUTIONS` wherever there is not.
 */
export interface Caution {
  readonly heading: string;
  readonly says: string;
}

export const CAUTIONS: readonly Caution[] = [
  {
    heading: 'No rating comes from here',
    says: 'Rated capacities come from the maker, the supplier or a competent engineer, for exactly this rack as it stands. This program compares the loads you state with the ratings you enter.',
  },
  {
    heading: 'No rating, no pass',
    says: 'Where a rating is not known, every check that needs it is “not assessable”, and that never counts as within.',
  },
  {
    heading: 'Law and maker first',
    says: 'Local law, building and fire codes and the maker’s instructions come before anything shown here.',
  },
  {
    heading: 'A competent person confirms',
    says: 'Damage classes, decisions to unload and every change to the rack are confirmed by a competent person. Practice in the United States is to unload on any visible damage.',
  },
  {
    heading: 'A moved beam changes everything',
    says: 'Moving, adding or taking out a beam changes what the whole bay and its neighbours can carry. Have it confirmed in writing, empty the levels above first, and renew the load notice afterwards.',
  },
  {
    heading: 'What a rating takes for granted',
    says: 'Published ratings hold for a rack that is undamaged, plumb and anchored, with locks in place and original parts, evenly loaded, with front and rear beams sharing alike.',
  },
  {
    heading: 'The even load is a comparison',
    says: 'The equivalent uniform load is a way to compare. Stiff beam-end connectors can make loads near mid-span count for more than is shown.',
  },
  {
    heading: 'Sag and strength are two things',
    says: 'Deflection within its limit does not prove strength; deflection beyond its limit is always a reason to act.',
  },
  {
    heading: 'Masses are as entered',
    says: 'A mass from a stock system may be net, out of date or a placeholder. Weigh the goods when little is to spare.',
  },
  {
    heading: 'The floor is not calculated',
    says: 'Leg loads are compared only with what the floor’s owner states. Suspended floors, joints, edges and voids need an engineer.',
  },
  {
    heading: 'Not covered',
    says: 'Earthquake, wind, impact, fire, dynamic effects and fatigue are not covered, nor the design of anchors and slabs.',
  },
  {
    heading: 'Damage has no safe percentage',
    says: 'There is no share of its rating that a damaged part may keep. The program never lowers a rating by itself.',
  },
  {
    heading: 'Figures to be confirmed',
    says: 'Figures marked “to be confirmed” were written down from memory of standards. Check them in your own current edition before you rely on them.',
  },
  {
    heading: 'One rule set',
    says: 'Results belong to the rule set that is named on the page: European, United States or Australian. Do not mix them.',
  },
  {
    heading: 'Decks carry even, resting loads',
    says: 'A mesh or panel rating is for an evenly spread load at rest; wheels, legs, rims and climbing are outside it. Nobody may stand on shelves.',
  },
  {
    heading: 'Between and beyond the table',
    says: 'A rating taken between two rows of a table is marked as such. None is ever taken from beyond the end of a table.',
  },
  {
    heading: 'Keep the report',
    says: 'Keep it with its date, the person, the source of each rating and the edition of the notice. A change to the rack makes an older report void.',
  },
  { heading: 'In doubt', says: 'Unload first, then ask.' },
];

/** For every screen and the foot of every page. */
export const FOOTER_CAUTIONS: readonly string[] = [
  'Compares stated loads with entered ratings; it rates nothing.',
  'The maker’s rated capacities and the local code decide; a competent person confirms.',
  'Not covered: earthquake, wind, impact, fire, fatigue, anchors, slab design.',
  'When in doubt, unload first.',
];

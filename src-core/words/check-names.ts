/** Every check's name and what it asks, in the words of the people who answer for a rack. */
import type { CheckName } from '../checks/finding';

export interface CheckWords {
  readonly name: string;
  /** One line: what the check asks. */
  readonly asks: string;
}

export const CHECK_WORDS: Readonly<Record<CheckName, CheckWords>> = {
  placement: { name: 'Standing room', asks: 'Do the goods stand on the level, clear of its ends and of each other?' },
  tipping: { name: 'Front and rear', asks: 'Is each unit load’s centre of mass between the two beams?' },
  'unit-load': { name: 'Unit load', asks: 'Is each unit load, pallet included, within the notice’s unit load limit?' },
  positions: { name: 'Number of unit loads', asks: 'Are there no more unit loads on the level than the notice is made for?' },
  'pallet-bearing': { name: 'Pallet bearing', asks: 'Do the blocks or runners of each pallet bear on both beams or on a deck?' },
  overhang: { name: 'Overhang', asks: 'Does each pallet stand past the beams, front and rear, no further than allowed?' },
  'goods-form': { name: 'Form of the goods', asks: 'Can the goods lean, roll or press through on rims, wheels or feet?' },
  'level-total': { name: 'Level total', asks: 'Is the mass on the worse beam within half the pair’s rating?' },
  'beam-bending': { name: 'Beam bending', asks: 'Does the load bend the worse beam no harder than the rated even load?' },
  'beam-end-shear': { name: 'Beam end', asks: 'Does no beam end carry more than the notice or the maker proves?' },
  'beam-deflection': { name: 'Beam deflection', asks: 'Does the worse beam sag no further than under the rated even load?' },
  'full-complement': {
    name: 'Designed full complement',
    asks: 'Is this the evenly spaced full set of equal unit loads that the notice was made for?',
  },
  'section-stress': { name: 'Bending stress', asks: 'Is the stress in the worse beam within its design stress?' },
  'section-deflection': { name: 'Sag in millimetres', asks: 'Is the sag of the worse beam within the limit of the rule set?' },
  'beam-sag': { name: 'Measured sag', asks: 'Does each beam that was measured sag no further than allowed, loaded and unloaded?' },
  'deck-panel': { name: 'Deck panel', asks: 'Does each panel carry its part of the goods within its own rating?' },
  'area-load': { name: 'Area load', asks: 'Is the load per area under the heaviest goods within the level’s rated share?' },
  'clearance-along': { name: 'Clearance along', asks: 'Is there room enough between goods, and from goods to uprights?' },
  'clearance-above': { name: 'Clearance above', asks: 'Is there room enough between the goods and the beam above, sagged?' },
  'clearance-across': { name: 'Clearance across', asks: 'Is there room enough between goods that stand back to back?' },
  'bay-total': { name: 'Bay total', asks: 'Is everything on the bay’s beam levels within the rated bay load?' },
  'notice-match': { name: 'Notice against the rack', asks: 'Does the rack stand as its load notice describes it?' },
  'heavy-low': { name: 'Heavy goods low', asks: 'Do the heavier goods stand on the lower levels?' },
  'site-flags': { name: 'Conditions of use', asks: 'Is there anything, such as earthquake or wind, that this program cannot judge?' },
  'frame-storey': { name: 'Upright frame', asks: 'Does the frame carry both its bays within its rating, storey by storey?' },
  'frame-imbalance': { name: 'Imbalance at the frame', asks: 'Do the two bays load the frame much alike?' },
  'leg-load': { name: 'Leg load', asks: 'Is the force of each leg within what the floor’s owner allows?' },
  'plate-pressure': {
    name: 'Pressure under the base plate',
    asks: 'Is the pressure under each plate within what the floor’s owner allows?',
  },
  'back-to-back-legs': { name: 'Legs back to back', asks: 'Do legs that stand close together stay within the floor’s limit for a pair?' },
  'floor-area': { name: 'Floor load by area', asks: 'Is the load per area of the run within what the floor’s owner allows?' },
  'height-to-depth': { name: 'Height to depth', asks: 'Is the run low enough for its depth, or held at the top?' },
  'anchor-pull': { name: 'Anchor pull', asks: 'How hard would a sideways force at the top pull on the floor anchors?' },
  plumb: { name: 'Plumb', asks: 'Do the uprights stand upright enough?' },
  damage: {
    name: 'Damage',
    asks: 'Is every measured bend within the limit, and is nothing torn, dented or, of the beams, damaged at all?',
  },
};

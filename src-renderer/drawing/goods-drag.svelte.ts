/**
 * Dragging goods in the bay's drawing. Every move of the pointer is tried on the open site, so that
 * drawing and verdict show it; letting go keeps it, Escape or a lost pointer takes it back.
 */
import type { Id } from '../../src-core/site/site';
import type { OpenSite, Target } from '../state/open-site.svelte';
import { placementPlace, type PlacementPlace } from '../editing/places';
import type { Move } from '../editing/put-down';
import type { BayDrawn } from './bay-model';
import { dropAt, type Carrying, type Drop } from './drop';

/** A press that moves less than this is a click, px. */
const SLACK = 4;
/** A bay in the strip comes up when goods are held over it this long, ms. */
const DWELL = 300;

export interface DragSurface {
  readonly element: HTMLElement;
  /** The bay as it is drawn now, with what it would carry. */
  readonly carrying: (placementId: Id) => Carrying | null;
}

interface Press {
  readonly placementId: Id;
  readonly pointerId: number;
  readonly x: number;
  readonly y: number;
  /** Pointer right of the goods' left edge, px. */
  readonly grab: number;
}

export const targetOfDrop = (bay: BayDrawn, { level, place }: Drop): Target =>
  level.levelId === null ? { levelId: null, bayId: bay.bayId, atMm: place.at } : { levelId: level.levelId, atMm: place.at };

export class GoodsDrag {
  dragging = $state<Id | null>(null);
  /** Where it stands while it is dragged or carried, for the tag beside it. */
  drop = $state.raw<Drop | null>(null);
  /** Selected goods of the same level that go along, and where all of them stood. */
  along = $state.raw<readonly Id[]>([]);
  #stood: readonly PlacementPlace[] = [];
  #held: { readonly bayId: Id; readonly timer: ReturnType<typeof setTimeout> } | null = null;
  #press: Press | null = null;
  #justDragged = false;

  constructor(
    private readonly open: OpenSite,
    private readonly surface: () => DragSurface | null,
  ) {}

  press = (event: PointerEvent, placementId: Id): void => {
    const surface = this.surface();
    if (event.button !== 0 || surface === null || this.open.carried !== null) return;
    const carrying = surface.carrying(placementId);
    const goods = carrying?.bay.levels.flatMap((level) => level.goods).find((one) => one.placementId === placementId);
    if (!carrying || !goods) return;
    const { left, top } = surface.element.getBoundingClientRect();
    const [x, y] = [event.clientX - left, event.clientY - top];
    this.#press = { placementId, pointerId: event.pointerId, x, y, grab: x - carrying.scale.x(goods.at) };
    this.#justDragged = false;
  };

  move = (event: PointerEvent): void => {
    const surface = this.surface();
    if (surface === null) return;
    const { left, top } = surface.element.getBoundingClientRect();
    const [x, y] = [event.clientX - left, event.clientY - top];
    const press = this.#press;
    if (press !== null && event.pointerId === press.pointerId) {
      if (this.dragging === null && Math.hypot(x - press.x, y - press.y) < SLACK) return;
      if (this.dragging === null) this.#begin(press, surface);
      if (this.#overBay(event)) return;
      this.#try(press.placementId, surface, x - press.grab, y, event.altKey);
    } else if (this.open.carried !== null) {
      const carrying = surface.carrying(this.open.carried);
      if (carrying) this.#try(this.open.carried, surface, x - (carrying.width * carrying.scale.rate) / 2, y, event.altKey);
    }
  };

  release = (event: PointerEvent): void => {
    if (this.#press?.pointerId !== event.pointerId) return;
    const { dragging } = this;
    this.#end();
    if (dragging === null) return;
    this.#justDragged = true;
    // Let go over the strip it has no place in the bay yet.
    if (bayUnder(event) === null) this.open.keepTrial();
    else this.#takeBack();
  };

  cancel = (): void => {
    if (this.dragging === null) return;
    this.#end();
    this.#takeBack();
  };

  /** True for the click that ends a drag, which is no click of its own. */
  swallowClick = (): boolean => {
    const swallow = this.#justDragged;
    this.#justDragged = false;
    return swallow;
  };

  /** Held over a bay in the strip for a moment, that bay comes up to put the goods down in; crossing others brings none up. */
  #overBay(event: PointerEvent): boolean {
    const bayId = bayUnder(event);
    if (bayId !== this.#held?.bayId) {
      clearTimeout(this.#held?.timer);
      const comeUp = () => this.dragging !== null && this.open.select({ bayId });
      this.#held = bayId === null ? null : { bayId, timer: setTimeout(comeUp, DWELL) };
    }
    return bayId !== null;
  }

  /** As it was before the drag, whichever bay came up meanwhile. */
  #takeBack(): void {
    this.open.dropTrial();
    this.open.select({ placementIds: this.#stood.map(({ placement }) => placement.id) });
  }

  #begin(press: Press, surface: DragSurface): void {
    this.dragging = press.placementId;
    // The surface, not the goods: they may be drawn anew on another level while the pointer is down.
    surface.element.setPointerCapture(press.pointerId);
    const { selection, site } = this.open;
    const own = placementPlace(site, press.placementId);
    const chosen = selection.placementIds.includes(press.placementId) ? selection.placementIds : [press.placementId];
    const places = chosen.flatMap((id) => placementPlace(site, id) ?? []);
    // Goods of other levels keep their places: it would not be seen where they go.
    this.#stood = places.filter(({ bay, level }) => bay.id === own?.bay.id && level?.id === own.level?.id);
    this.along = this.#stood.map(({ placement }) => placement.id).filter((id) => id !== press.placementId);
    this.open.select({ placementIds: [press.placementId, ...this.along] });
  }

  #end(): void {
    clearTimeout(this.#held?.timer);
    this.#held = null;
    this.#press = null;
    this.dragging = null;
    this.drop = null;
    this.along = [];
  }

  #try(placementId: Id, surface: DragSurface, px: number, py: number, freely: boolean): void {
    const carrying = surface.carrying(placementId);
    const drop = carrying && dropAt(carrying, px, py, freely);
    if (!carrying || !drop) return;
    const same = this.drop !== null && this.drop.level.levelId === drop.level.levelId && this.drop.place.at === drop.place.at;
    const elsewhere = this.drop?.level.levelId !== drop.level.levelId;
    this.drop = drop;
    if (same) return;
    this.open.tryMoves(this.#moves(placementId, carrying.bay, drop));
    // Diagrams and findings follow to the level over which it is held.
    if (elsewhere) this.open.select({ placementIds: [placementId, ...this.along] });
  }

  /** What goes along keeps its distance, and the whole group stays between the uprights where it fits. */
  #moves(placementId: Id, bay: BayDrawn, drop: Drop): readonly Move[] {
    const target = targetOfDrop(bay, drop);
    const own = this.#stood.find(({ placement }) => placement.id === placementId);
    if (own === undefined || this.along.length === 0) return [{ placementId, target }];
    const group = this.#stood;
    const left = Math.min(...group.map(({ placement }) => placement.atMm));
    const right = Math.max(...group.map(({ placement, unitLoad }) => placement.atMm + unitLoad.widthMm));
    const wanted = target.atMm - own.placement.atMm;
    const by = Math.max(-left, Math.min(bay.entry - right, wanted));
    return group.map(({ placement: { id, atMm, towardsFrontMm } }) => ({
      placementId: id,
      target: { ...target, atMm: atMm + by, towardsFrontMm },
    }));
  }
}

const bayUnder = ({ clientX, clientY }: PointerEvent): Id | null =>
  document.elementFromPoint(clientX, clientY)?.closest<HTMLElement>('[data-bay]')?.dataset['bay'] ?? null;

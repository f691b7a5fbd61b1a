import { DndContext, KeyboardSensor, PointerSensor, useSensor, useSensors } from '@dnd-kit/core';
import { memo, useEffect, useMemo, useRef, useState, type ReactNode } from 'react';
import { betweenVessels, overVessel } from './hand/targets';
import type { Hands } from './hand/useHand';
import { inHand, target } from './hand/machine';
import { Carried } from './scene/Carried';
import type { ShelfLook, VesselLook } from './scene/looks';
import { LevelLine, Scene } from './scene/Scene';
import { Shelf } from './scene/Shelf';
import { Station } from './scene/Station';

interface Props {
  id: string;
  title: string;
  lead: string | null;
  /** Every number names the model that it was computed with. */
  model: string;
  description: readonly string[];
  vessels: readonly VesselLook[];
  shelf: readonly ShelfLook[];
  from: string;
  into: string;
  hands: Hands;
  /** The vessel that drops fall into just now, and how many have. */
  dripping: { into: string; from: string; drops: number } | null;
  /** The vessel whose reading has just changed. */
  settling: string | null;
  onFrom: (id: string) => void;
  onInto: (id: string) => void;
  say: (message: string) => void;
  /** Words of the page on the wall, instead of the bench's own title and shelf. */
  words: ReactNode;
}

// Objects that never change keep dnd-kit from renewing its context with every frame of a pour.
const POINTER = { activationConstraint: { distance: 6 } };
const HOW =
  'Press Enter to pick up the bottle. Arrow keys carry it from vessel to vessel. Hold Space to pour, tap Space for one drop. Enter leaves it tipped over the vessel, Escape puts it back on the shelf.';

/** The scene with its gestures: drag, tap and keys all end in the same hand. */
export function BenchScene(props: Props) {
  const { vessels, shelf, hands, from, into, dripping } = props;
  const { hand, dispatch } = hands;
  const [way, setWay] = useState<'pointer' | 'keys'>('pointer');
  const where = useRef({ ids: [] as string[], wished: into });
  where.current = { ids: vessels.map((vessel) => vessel.id), wished: into };

  const reach = (id: string) => {
    dispatch({ kind: 'move', over: id });
    props.onInto(id);
    props.say(`Over ${nameOf(id)}`);
  };
  const reachNow = useRef(reach);
  useEffect(() => {
    reachNow.current = reach;
  });

  const getter = useMemo(
    () =>
      betweenVessels(
        () => ({ ...where.current, over: target(hands.current()) }),
        (id) => reachNow.current(id),
      ),
    // The hand's own reader never changes during a bench's life.
    // eslint-disable-next-line react-hooks/exhaustive-deps
    [],
  );
  const keys = useMemo(
    () => ({
      coordinateGetter: getter,
      keyboardCodes: { start: ['Enter'], cancel: ['Escape'], end: ['Enter'] },
    }),
    [getter],
  );
  const sensors = useSensors(useSensor(PointerSensor, POINTER), useSensor(KeyboardSensor, keys));

  const carried = inHand(hand);
  const over = target(hand);
  const tipped = shelf.find((item) => item.id === carried);
  const nameOf = (id: string) =>
    vessels.find((vessel) => vessel.id === id)?.name ?? shelf.find((item) => item.id === id)?.name ?? '';

  const held = useRef<string | null>(null);
  useEffect(() => {
    // A bottle that keys had left tipped over a vessel takes the focus home with it.
    const was = held.current;
    held.current = hand.at === 'poised' ? hand.from : null;
    const focused = document.activeElement;
    if (
      was !== null &&
      hand.at === 'rest' &&
      focused instanceof HTMLElement &&
      focused.dataset['vessel'] !== undefined
    ) {
      focusOn(props.id, `[data-bottle="${CSS.escape(was)}"]`);
    }
  }, [hand, props.id]);

  return (
    <DndContext
      id={`bench-${props.id}`}
      sensors={sensors}
      collisionDetection={overVessel}
      accessibility={ACCESS}
      onDragStart={(event) => {
        const by = event.activatorEvent instanceof KeyboardEvent ? 'keys' : 'pointer';
        setWay(by);
        const id = String(event.active.id);
        props.onFrom(id);
        dispatch({ kind: 'lift', from: id, by });
        props.say(`Picked up ${nameOf(id)}`);
      }}
      onDragOver={(event) => {
        // By keys the arrow itself has said which vessel it is.
        if (event.activatorEvent instanceof KeyboardEvent) return;
        if (event.over === null) dispatch({ kind: 'move', over: null });
        else reach(String(event.over.id));
      }}
      onDragEnd={() => {
        dispatch({ kind: 'drop' });
        const now = hands.current();
        // Space works on the vessel now; Escape will bring the focus home with the bottle.
        if (way === 'keys' && now.at === 'poised')
          focusOn(props.id, `[data-vessel="${CSS.escape(now.into)}"]`);
      }}
      onDragCancel={() => {
        // Escape has been heard by the hand itself; anything else that ends a drag came from outside.
        dispatch({ kind: 'interrupt' });
        props.say('Put back');
      }}
    >
      <Scene
        id={props.id}
        title={props.title}
        lead={props.lead}
        model={props.model}
        hero={props.words}
        vessels={vessels}
        description={props.description}
        shelf={
          <Shelf
            items={shelf}
            chosen={from}
            picked={hand.at === 'picked' ? hand.from : null}
            away={carried}
            onPick={(id) => {
              props.onFrom(id);
              dispatch({ kind: 'pick', from: id });
            }}
          />
        }
        stations={vessels.map((vessel, i) => (
          <StationAt
            key={vessel.id}
            benchId={props.id}
            vessel={vessel}
            beside={i > 0 && vessels.length === 2 && props.words == null ? vessels[i - 1]! : null}
            tagSide={tagSide(vessels.length, i, props.words != null)}
            chosen={vessel.id === into}
            takes={carried !== null && over === null && vessel.full === null}
            tipped={over === vessel.id ? tipped : undefined}
            pouring={hand.at === 'pouring'}
            drops={dripping?.into === vessel.id ? dripping.drops : 0}
            dropPaint={
              dripping?.into === vessel.id
                ? shelf.find((item) => item.id === dripping.from)?.paint
                : undefined
            }
            settling={props.settling === vessel.id}
            hands={hands}
            onInto={props.onInto}
          />
        ))}
      />
      <Carried item={way === 'pointer' && hand.at === 'carried' && over === null ? (tipped ?? null) : null} />
    </DndContext>
  );
}

/** Moves the focus within one bench. */
function focusOn(benchId: string, selector: string): void {
  document.getElementById(`bench-${benchId}`)?.querySelector<HTMLElement>(selector)?.focus();
}

/** Tags stand outside the two glasses of a pair; beside words on the wall they all stand on the right. */
function tagSide(count: number, i: number, besideWords: boolean): 'left' | 'right' | 'under' {
  if (count > 2) return 'under';
  return count === 2 && i === 0 && !besideWords ? 'left' : 'right';
}

/** The bench speaks for itself, politely: dnd-kit's own announcements stay silent. */
const SILENT = {
  onDragStart: () => undefined,
  onDragOver: () => undefined,
  onDragEnd: () => undefined,
  onDragCancel: () => undefined,
};

const ACCESS = { announcements: SILENT, restoreFocus: false, screenReaderInstructions: { draggable: HOW } };

interface AtProps {
  benchId: string;
  vessel: VesselLook;
  beside: VesselLook | null;
  tagSide: 'left' | 'right' | 'under';
  chosen: boolean;
  takes: boolean;
  tipped: ShelfLook | undefined;
  pouring: boolean;
  drops: number;
  dropPaint: ShelfLook['paint'] | undefined;
  settling: boolean;
  hands: Hands;
  onInto: (id: string) => void;
}

const StationAt = memo(function StationAt(props: AtProps) {
  const { vessel, tipped, drops, dropPaint, hands } = props;
  return (
    <Station
      benchId={props.benchId}
      vessel={vessel}
      tagSide={props.tagSide}
      chosen={props.chosen}
      takes={props.takes}
      over={
        tipped ? { look: tipped, paint: tipped.paint, level: tipped.level, pouring: props.pouring } : null
      }
      dripping={dropPaint ? { paint: dropPaint, drops } : null}
      settling={props.settling}
      onPlace={(id) => {
        props.onInto(id);
        hands.dispatch({ kind: 'place', into: id });
      }}
      onReach={(id) => {
        const hand = hands.current();
        if (hand.at === 'carried' && hand.by === 'keys') hands.dispatch({ kind: 'move', over: id });
      }}
      onPress={hands.press}
      onRelease={hands.release}
      onLost={hands.lost}
      beside={props.beside && <LevelLine left={props.beside} right={vessel} />}
    />
  );
});

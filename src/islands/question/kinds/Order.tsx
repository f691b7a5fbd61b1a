import {
  closestCenter,
  DndContext,
  PointerSensor,
  pointerWithin,
  useDraggable,
  useDroppable,
  useSensor,
  useSensors,
  type CollisionDetection,
} from '@dnd-kit/core';
import { useLayoutEffect, useState } from 'react';
import type { Answer } from '../../../lessons/questions/types';
import { moved, type SpecOf } from '../drafts';
import { Html } from '../Html';
import { DownIcon, GripIcon, UpIcon } from '../icons';

interface Props {
  spec: SpecOf<'order'>;
  draft: Extract<Answer, { kind: 'order' }>;
  labelledBy: string;
  fixed: boolean;
  misplaced: ReadonlySet<string>;
  onDraft: (draft: Answer) => void;
  say: (message: string) => void;
}

const SILENT = {
  announcements: {
    onDragStart: () => undefined,
    onDragOver: () => undefined,
    onDragEnd: () => undefined,
    onDragCancel: () => undefined,
  },
  screenReaderInstructions: { draggable: '' },
};
const SENSOR = { activationConstraint: { distance: 4 } };

/** The item under the hand; above, below and between them the nearest one. */
const underHand: CollisionDetection = (args) => {
  const hit = pointerWithin(args);
  return hit.length > 0 ? hit : closestCenter(args);
};

/** A list to be put in order: by buttons and keys, or by dragging an item at its grip to another one's place. */
export function Order({ spec, draft, labelledBy, fixed, misplaced, onDraft, say }: Props) {
  const { order } = draft;
  const [focus, setFocus] = useState<string | null>(null);
  const sensors = useSensors(useSensor(PointerSensor, SENSOR));
  // React moves the nodes of a list about, and a button that is moved loses the focus.
  useLayoutEffect(() => {
    if (focus !== null) document.getElementById(focus)?.focus();
  }, [focus, order]);
  const move = (id: string, to: number) => {
    if (to < 0 || to >= order.length || order[to] === id) return;
    onDraft({ kind: 'order', order: moved(order, id, to) });
    say(`Now ${to + 1} of ${order.length}.`);
  };
  const text = (id: string) => spec.items.find((item) => item.id === id)!.text;
  return (
    <DndContext
      sensors={sensors}
      collisionDetection={underHand}
      accessibility={SILENT}
      onDragEnd={({ active, over }) => {
        setFocus(null);
        if (over) move(String(active.id), order.indexOf(String(over.id)));
      }}
    >
      <ol className="question-order" aria-labelledby={labelledBy}>
        {order.map((id, place) => (
          <Item
            key={id}
            id={id}
            name={`${labelledBy}-${id}`}
            html={text(id)}
            place={place}
            count={order.length}
            fixed={fixed}
            misplaced={misplaced.has(id)}
            onMove={(to, button) => {
              setFocus(button);
              move(id, to);
            }}
          />
        ))}
      </ol>
    </DndContext>
  );
}

function Item(props: {
  id: string;
  name: string;
  html: string;
  place: number;
  count: number;
  fixed: boolean;
  misplaced: boolean;
  onMove: (to: number, button: string) => void;
}) {
  const { id, name, html, place, count, fixed, misplaced, onMove } = props;
  const drag = useDraggable({ id, disabled: fixed, data: { place } });
  const drop = useDroppable({ id, data: { place } });
  const from = (drop.active?.data.current?.place as number | undefined) ?? place;
  const button = (to: number, word: 'up' | 'down', off: boolean) => (
    <button
      type="button"
      id={`${name}-${word}`}
      className="question-step"
      aria-label={`Move ${word}`}
      aria-describedby={`${name}-text`}
      aria-disabled={off || undefined}
      onClick={() => {
        if (!off) onMove(to, `${name}-${word}`);
      }}
    >
      {word === 'up' ? <UpIcon /> : <DownIcon />}
    </button>
  );
  return (
    <li
      ref={(node) => {
        drag.setNodeRef(node);
        drop.setNodeRef(node);
      }}
      className="question-item"
      data-carried={drag.isDragging || undefined}
      data-over={drop.isOver && !drag.isDragging ? (from > place ? 'above' : 'below') : undefined}
      data-misplaced={misplaced || undefined}
      style={drag.transform ? { transform: `translateY(${drag.transform.y}px)` } : undefined}
    >
      <span className="question-place" aria-hidden="true">
        {place + 1}
      </span>
      {!fixed && (
        <span ref={drag.setActivatorNodeRef} className="question-grip" {...drag.listeners} aria-hidden="true">
          <GripIcon />
        </span>
      )}
      <span className="question-item-text" id={`${name}-text`}>
        <Html as="span" html={html} />
        {misplaced && <span className="question-mark">not its place</span>}
      </span>
      {!fixed && (
        <span className="question-moves">
          {button(place - 1, 'up', place === 0)}
          {button(place + 1, 'down', place === count - 1)}
        </span>
      )}
    </li>
  );
}

import { useDraggable } from '@dnd-kit/core';
import { memo, type CSSProperties } from 'react';
import { Bottle } from '../glass/Bottle';
import { hazardWords } from '../glass/HazardMark';
import type { ShelfLook } from './looks';

interface ShelfProps {
  items: readonly ShelfLook[];
  chosen: string;
  picked: string | null;
  /** The bottle that is off the shelf; its place is dashed. */
  away: string | null;
  onPick: (id: string) => void;
}

/** The shelf: bottles that can be picked up by drag, by tap and by Enter. */
export function Shelf({ items, chosen, picked, away, onPick }: ShelfProps) {
  return (
    <ul className="shelf" aria-label="Shelf" style={{ '--items': items.length } as CSSProperties}>
      {items.map((item) => (
        <li key={item.id} className="shelf-place">
          <ShelfBottle
            item={item}
            chosen={item.id === chosen}
            picked={item.id === picked}
            away={item.id === away}
            onPick={onPick}
          />
        </li>
      ))}
    </ul>
  );
}

const ShelfBottle = memo(function ShelfBottle(props: {
  item: ShelfLook;
  chosen: boolean;
  picked: boolean;
  away: boolean;
  onPick: (id: string) => void;
}) {
  const { item, chosen, picked, away, onPick } = props;
  const { setNodeRef, attributes, listeners } = useDraggable({
    id: item.id,
    attributes: { roleDescription: 'bottle' },
  });
  const hazards = item.hazards.map(hazardWords).join(', ');
  return (
    <button
      ref={setNodeRef}
      type="button"
      {...attributes}
      {...listeners}
      className="shelf-bottle"
      data-bottle={item.id}
      data-chosen={chosen || undefined}
      data-picked={picked || undefined}
      data-away={away || undefined}
      aria-pressed={picked || away}
      aria-label={[item.name, item.strength, hazards && `hazard: ${hazards}`, item.level <= 0 && 'empty']
        .filter(Boolean)
        .join(', ')}
      onClick={() => onPick(item.id)}
    >
      <Bottle look={item} liquid={item.paint} level={item.level} />
    </button>
  );
});

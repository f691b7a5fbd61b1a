import { useDndMonitor } from '@dnd-kit/core';
import { useEffect, useRef, useState, type CSSProperties } from 'react';
import { Bottle, BOTTLE } from '../glass/Bottle';
import type { ShelfLook } from './looks';

interface Props {
  /** The bottle in a free hand; null when none is, or when it is tipped over a vessel. */
  item: ShelfLook | null;
}

const RETURN_S = 0.2;

/** Only a hand that drags needs it: fetched when the first drag begins. */
const motion = () => import('framer-motion/dom/mini');

/** The bottle that follows the pointer. It is moved by hand, without a render for each move. */
export function Carried({ item }: Props) {
  const scope = useRef<HTMLDivElement>(null);
  const [home, setHome] = useState<{ left: number; top: number; width: number } | null>(null);
  const [returning, setReturning] = useState<ShelfLook | null>(null);
  const free = useRef<ShelfLook | null>(null);
  const at = useRef({ x: 0, y: 0 });
  useEffect(() => {
    free.current = item;
  }, [item]);

  const finish = () => {
    const { x, y } = at.current;
    at.current = { x: 0, y: 0 };
    // A bottle that is tipped over a vessel stays there, or goes home from there.
    const still = window.matchMedia('(prefers-reduced-motion: reduce)').matches;
    if (still || !scope.current || !free.current || (x === 0 && y === 0)) return;
    setReturning(free.current);
    const bottle = scope.current;
    motion()
      .then(({ animate }) =>
        animate(
          bottle,
          { transform: [`translate(${x}px, ${y}px)`, 'translate(0px, 0px)'] },
          { duration: RETURN_S, ease: 'easeOut' },
        ),
      )
      // Without a connection it may not be there: then the bottle is home at once.
      .catch(() => undefined)
      .finally(() => setReturning(null));
  };

  useDndMonitor({
    onDragStart: (event) => {
      void motion().catch(() => undefined);
      const rect = event.active.rect.current.initial;
      const bottle = document.querySelector(`[data-bottle="${CSS.escape(String(event.active.id))}"]`);
      const box = bottle?.getBoundingClientRect() ?? rect;
      if (box) setHome({ left: box.left, top: box.top, width: box.width });
      at.current = { x: 0, y: 0 };
    },
    onDragMove: (event) => {
      at.current = { x: event.delta.x, y: event.delta.y };
      if (scope.current) scope.current.style.transform = `translate(${event.delta.x}px, ${event.delta.y}px)`;
    },
    onDragEnd: finish,
    onDragCancel: finish,
  });

  const shown = item ?? returning;
  return (
    <div
      ref={scope}
      className="carried"
      hidden={shown === null || home === null}
      style={
        home
          ? ({ left: home.left, top: home.top, '--b': home.width / BOTTLE.width } as CSSProperties)
          : undefined
      }
      aria-hidden="true"
    >
      {shown && <Bottle look={shown} liquid={shown.paint} level={shown.level} tip={returning ? 0 : 6} />}
    </div>
  );
}

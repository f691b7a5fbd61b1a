import { pointerWithin, type CollisionDetection, type KeyboardCoordinateGetter } from '@dnd-kit/core';

/** Under a pointer: the vessel that it is in. By keys: the vessel that the bottle's middle is in. */
export const overVessel: CollisionDetection = (args) => {
  if (args.pointerCoordinates) return pointerWithin(args);
  const { left, top, width, height } = args.collisionRect;
  return pointerWithin({ ...args, pointerCoordinates: { x: left + width / 2, y: top + height / 2 } });
};

const FORWARD = new Set(['ArrowRight', 'ArrowDown']);
const BACK = new Set(['ArrowLeft', 'ArrowUp']);

/** The id after `current` in the named direction; from nowhere, the wished one or the first. Stops at the ends. */
export function nextTarget(
  ids: readonly string[],
  current: string | null,
  wished: string,
  key: string,
): string | null {
  if (ids.length === 0 || (!FORWARD.has(key) && !BACK.has(key))) return null;
  const at = current === null ? -1 : ids.indexOf(current);
  if (at === -1) return ids.includes(wished) ? wished : ids[0]!;
  const to = FORWARD.has(key) ? Math.min(ids.length - 1, at + 1) : Math.max(0, at - 1);
  return ids[to]!;
}

/**
 * Arrow keys carry the bottle from one named vessel to the next, in reading order, instead of by pixels.
 * @param now where the bottle is, and which vessel the sentence names
 * @param reach told the vessel that the bottle is over now. Keys say which one it is: what the page's layout does
 * meanwhile (it scrolls, the notebook grows) takes no bottle away.
 */
export function betweenVessels(
  now: () => { ids: readonly string[]; over: string | null; wished: string },
  reach: (id: string) => void,
): KeyboardCoordinateGetter {
  return (event, { context }) => {
    const { ids, over, wished } = now();
    const next = nextTarget(ids, over, wished, event.code);
    if (next === null) return undefined;
    event.preventDefault();
    reach(next);
    const target = context.droppableRects.get(next);
    const carried = context.collisionRect;
    if (!target || !carried) return undefined;
    return {
      x: target.left + target.width / 2 - carried.width / 2,
      y: target.top + target.height / 2 - carried.height / 2,
    };
  };
}

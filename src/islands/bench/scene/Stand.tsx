import { memo } from 'react';

/** The rod and clamps that hold a burette, in its own millimetres; the foot stands on the slab. */
export const Stand = memo(function Stand({ top_mm, r_mm }: { top_mm: number; r_mm: number }) {
  const x = -r_mm - 9;
  return (
    <>
      <path className="stand-rod" d={`M ${x} ${-top_mm - 2} V 40 M ${x - 10} 39 H ${x + 16}`} />
      <path className="stand-clamp" d={`M ${x - 2} ${-top_mm * 0.78} H ${-r_mm - 1.4} M ${x - 2} ${-top_mm * 0.3} H ${-r_mm - 1.4}`} />
    </>
  );
});

import { memo } from 'react';

/** The rod, foot and clamps that hold a burette, in its own millimetres; the foot stands on the slab. */
export const Stand = memo(function Stand({
  top_mm,
  r_mm,
  floor_mm,
}: {
  top_mm: number;
  r_mm: number;
  floor_mm: number;
}) {
  const x = -r_mm - 10;
  return (
    <>
      <path
        className="stand-rod"
        d={`M ${x} ${-top_mm} V ${floor_mm - 1} M ${x - 8} ${floor_mm - 0.6} H ${x + 20}`}
      />
      <path
        className="stand-clamp"
        d={`M ${x - 2} ${-top_mm * 0.8} H ${-r_mm - 1.6} M ${x - 2} ${-top_mm * 0.3} H ${-r_mm - 1.6}`}
      />
    </>
  );
});

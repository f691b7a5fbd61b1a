import { measure } from '../glass/Glass';
import { STIRRER_MM } from '../glass/tools';
import type { VesselLook } from './looks';

/** How the vessels stand in rows, for a wide and for a narrow bench. Widths in mm. */
export interface SlabLayout {
  readonly columns: number;
  readonly rows: number;
  /** Millimetres that the fullest row needs; the scene's scale follows from it. */
  readonly span_mm: number;
  /** The tallest glass, mm. */
  readonly tall_mm: number;
  readonly at: readonly { readonly column: number; readonly row: number }[];
}

type Standing = Pick<VesselLook, 'shape' | 'stirrer'>;

const GAP_MM = 12;
const WIDE_COLUMNS = 6;
const NARROW_COLUMNS = 2;

/** Rows of nearly equal length, at most `most` in a row. */
function arrange(vessels: readonly Standing[], most: number, gap_mm: number): SlabLayout {
  const count = Math.max(1, vessels.length);
  const rows = Math.ceil(count / most);
  const columns = Math.ceil(count / rows);
  const widths = vessels.map((vessel) => measure(vessel.shape).width);
  // Columns are equally wide, so the widest glass decides.
  const span_mm = Math.max(1, columns) * (Math.max(20, ...widths) + gap_mm);
  const tall_mm = Math.max(
    20,
    ...vessels.map((vessel) => measure(vessel.shape).height + (vessel.stirrer ? STIRRER_MM : 0)),
  );
  return {
    columns,
    rows,
    span_mm: Math.round(span_mm),
    tall_mm: Math.round(tall_mm),
    at: vessels.map((_, i) => ({ column: (i % columns) + 1, row: Math.floor(i / columns) })),
  };
}

export const wideLayout = (vessels: readonly Standing[]): SlabLayout =>
  arrange(vessels, WIDE_COLUMNS, GAP_MM);

/** On a phone two beakers stand side by side; narrow glasses stand three in a row. */
export function narrowLayout(vessels: readonly Standing[]): SlabLayout {
  const slender = vessels.every((vessel) => measure(vessel.shape).width < 34);
  return arrange(vessels, slender ? NARROW_COLUMNS + 1 : NARROW_COLUMNS, GAP_MM);
}

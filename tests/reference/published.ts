/** Rows of data/chemistry.json, the published check values: every row names its source. */
import chemistry from './data/chemistry.json' with { type: 'json' };

/** One published value; which other fields it has depends on its kind. */
export type Row = { readonly kind: string; readonly source: string; readonly source_id: string } & Readonly<
  Record<string, unknown>
>;

const sections = chemistry.sections as unknown as readonly { n: number; rows: readonly Row[] }[];

/**
 * Rows of one section and kind, in the order of the file.
 * @throws where there is none: a check of nothing proves nothing
 */
export function published<T>(section: number, kind: string): (Row & T)[] {
  const rows = sections.find((s) => s.n === section)?.rows.filter((row) => row.kind === kind) ?? [];
  if (rows.length === 0) throw new Error(`Section ${section} has no rows of kind '${kind}'.`);
  return rows as (Row & T)[];
}

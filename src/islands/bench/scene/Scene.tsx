import type { CSSProperties, ReactNode } from 'react';
import { useWords } from '../../words';
import { FLOOR_MM } from '../glass/shape';
import { STIRRER_MM } from '../glass/tools';
import { narrowLayout, wideLayout } from './layout';
import { formatMl, type VesselLook } from './looks';

interface SceneProps {
  id: string;
  title: string;
  lead: string | null;
  model: string;
  /** A page's own words on the wall, in the place of title and shelf. */
  hero: ReactNode;
  shelf: ReactNode;
  vessels: readonly VesselLook[];
  stations: readonly ReactNode[];
  /** The text alternative of the scene, in sentences. */
  description: readonly string[];
}

/** Wall, shelf, vessels and slab. The scene is described in words for those who do not see it. */
export function Scene({ id, title, lead, model, hero, shelf, vessels, stations, description }: SceneProps) {
  const wide = wideLayout(vessels);
  const narrow = narrowLayout(vessels);
  const variables = {
    '--wide-columns': wide.columns,
    '--narrow-columns': narrow.columns,
    '--wide-span': wide.span_mm,
    '--narrow-span': narrow.span_mm,
    '--tall': wide.tall_mm,
  } as CSSProperties;
  return (
    <div className="scene" style={variables} data-vessels={vessels.length}>
      <div className="wall-tiles" aria-hidden="true" />
      {hero == null ? (
        <div className="wall-top">
          <div className="wall-words">
            <span className="tape tape-kind">Bench</span>
            <h2 id={`${id}-title`}>{title}</h2>
            {lead && <p className="wall-lead">{lead}</p>}
            <p className="wall-model">{model}</p>
          </div>
          {shelf}
        </div>
      ) : (
        <div className="wall-hero">
          <h2 className="visually-hidden" id={`${id}-title`}>
            {title}
          </h2>
          {hero}
        </div>
      )}
      <div className="visually-hidden">
        {description.map((sentence) => (
          <p key={sentence}>{sentence}</p>
        ))}
      </div>
      <div className="stations">
        {Array.from({ length: Math.max(wide.rows, narrow.rows) }, (_, row) => (
          <Band key={row} row={row} wideRows={wide.rows} narrowRows={narrow.rows} />
        ))}
        {stations.map((station, i) => {
          const w = wide.at[i]!;
          const n = narrow.at[i]!;
          const place = {
            '--wide-column': w.column + 1,
            '--wide-row': w.row * 3 + 1,
            '--narrow-column': n.column + 1,
            '--narrow-row': n.row * 3 + 1,
          } as CSSProperties;
          return (
            <div key={i} className="place" style={place}>
              {station}
            </div>
          );
        })}
      </div>
    </div>
  );
}

/** The slab's edge and the apron behind the tags, for one row of vessels. */
function Band({ row, wideRows, narrowRows }: { row: number; wideRows: number; narrowRows: number }) {
  const wide = row < wideRows ? '' : ' narrow-only';
  const narrow = row < narrowRows ? '' : ' wide-only';
  return (
    <>
      <div className={`slab-band${wide}${narrow}`} style={{ gridRow: row * 3 + 2 }} aria-hidden="true" />
      <div className={`tag-band${wide}${narrow}`} style={{ gridRow: row * 3 + 3 }} aria-hidden="true" />
    </>
  );
}

/** A dotted line between two equal glasses whose levels stand equally high. */
export function LevelLine({ left, right }: { left: VesselLook; right: VesselLook }) {
  const words = useWords();
  const same =
    left.level_mm !== null &&
    left.volume_uL !== null &&
    left.shape === right.shape &&
    left.volume_uL === right.volume_uL &&
    left.stirrer === right.stirrer;
  if (!same) return null;
  return (
    <span
      className="level-line"
      style={{ '--level': left.level_mm! + FLOOR_MM + (left.stirrer ? STIRRER_MM : 0) } as CSSProperties}
      aria-hidden="true"
    >
      <span>{words(formatMl(left.volume_uL!))} each</span>
    </span>
  );
}

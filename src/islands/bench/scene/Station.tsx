import { useDroppable } from '@dnd-kit/core';
import { useRef, type CSSProperties, type KeyboardEvent, type PointerEvent, type ReactNode } from 'react';
import { useWords } from '../../words';
import { Bottle, type BottleLook } from '../glass/Bottle';
import { Glass, measure } from '../glass/Glass';
import type { Paint } from '../glass/light';
import { Drop, Dropper, Probe, StirBar, Stirrer } from '../glass/tools';
import { describeVessel, type VesselLook } from './looks';
import { Tag } from './Tag';

export interface Over {
  readonly look: BottleLook;
  readonly paint: Paint;
  readonly level: number;
  readonly pouring: boolean;
}

interface StationProps {
  benchId: string;
  vessel: VesselLook;
  tagSide: 'left' | 'right' | 'under';
  chosen: boolean;
  /** A bottle is off the shelf and this vessel could take it. */
  takes: boolean;
  /** The bottle that is tipped over this vessel. */
  over: Over | null;
  /** A dropper is held over it; `drops` counts what has fallen, for the drop's flight. */
  dripping: { paint: Paint; drops: number } | null;
  settling: boolean;
  onPlace: (id: string) => void;
  /** Focus has reached the vessel. */
  onReach: (id: string) => void;
  onPress: () => void;
  onRelease: () => void;
  onLost: () => void;
  /** Drawn between this vessel and the one on its left. */
  beside: ReactNode;
}

/** Where a tipped bottle's lip and a dropper's tip stand above the rim. */
const OVER_RIM_MM = 13;

/** One vessel on the slab: glass, name tape, reading tag, and whatever is held over it. */
export function Station(props: StationProps) {
  const { vessel, tagSide, chosen, takes, over, dripping } = props;
  const { setNodeRef } = useDroppable({ id: vessel.id });
  const pressed = useRef(false);
  const poised = over !== null;
  const profile = vessel.shape.profile;
  const rim = profile[profile.length - 1]!.h;
  const entryX = -profile[profile.length - 1]!.r * 0.16;
  const stream = over?.pouring === true;

  const press = {
    onPointerDown: (event: PointerEvent<HTMLButtonElement>) => {
      if (!poised || event.button !== 0) return;
      event.currentTarget.setPointerCapture(event.pointerId);
      pressed.current = true;
      props.onPress();
    },
    onPointerUp: () => {
      if (!pressed.current) return;
      pressed.current = false;
      props.onRelease();
    },
    onPointerCancel: () => {
      if (!pressed.current) return;
      pressed.current = false;
      props.onLost();
    },
    onKeyDown: (event: KeyboardEvent) => {
      if (event.key !== ' ' || !poised) return;
      event.preventDefault();
      if (!event.repeat && !pressed.current) {
        pressed.current = true;
        props.onPress();
      }
    },
    onKeyUp: (event: KeyboardEvent) => {
      if (event.key !== ' ' || !pressed.current) return;
      event.preventDefault();
      pressed.current = false;
      props.onRelease();
    },
    onBlur: () => {
      if (!pressed.current) return;
      pressed.current = false;
      props.onLost();
    },
  };

  const words = useWords();
  const fall = `M ${entryX} ${-rim - OVER_RIM_MM} V ${-(vessel.level_mm ?? 0) + 0.6}`;
  const frame = measure(vessel.shape);
  const lip = {
    '--lip-x': `${((entryX - frame.x) / frame.width) * 100}%`,
    '--lip-y': `${((-rim - OVER_RIM_MM - frame.y) / frame.height) * 100}%`,
  } as CSSProperties;
  const says = `${props.benchId}-${vessel.id}-says`;

  return (
    <div className="station" data-tag={tagSide}>
      <button
        ref={setNodeRef}
        type="button"
        className="vessel"
        data-vessel={vessel.id}
        data-chosen={chosen || undefined}
        data-over={poised || undefined}
        data-takes={takes || undefined}
        aria-pressed={chosen}
        aria-label={vessel.name}
        aria-describedby={says}
        onClick={() => {
          if (!poised) props.onPlace(vessel.id);
        }}
        onFocus={() => props.onReach(vessel.id)}
        {...press}
      >
        <span className="vessel-glass" style={lip}>
          <Glass
            shape={vessel.shape}
            level_mm={vessel.level_mm}
            liquid={vessel.paint}
            unmixed={vessel.unmixed ?? undefined}
            brim_mm={vessel.full?.h}
            stirring={vessel.stirring}
            inside={vessel.stirrer ? <StirBar turning={vessel.stirring} /> : undefined}
            over={
              <>
                {vessel.probe && (
                  <Probe
                    x={-Math.max(0, Math.min(profile[0]!.r * 0.62, profile[profile.length - 1]!.r - 3.4))}
                    foot_mm={7}
                    length_mm={rim - 4}
                  />
                )}
                {stream && (
                  <>
                    <path className="stream-edge" d={fall} />
                    <path className="stream" d={fall} stroke={over!.paint.fill} />
                  </>
                )}
                {dripping && dripping.drops > 0 && (
                  <g key={dripping.drops} transform={`translate(${entryX} ${-rim - OVER_RIM_MM})`}>
                    <g
                      className="falling"
                      style={
                        { '--fall': `${rim + OVER_RIM_MM - 4 - (vessel.level_mm ?? 0)}px` } as CSSProperties
                      }
                    >
                      <Drop liquid={dripping.paint} />
                    </g>
                  </g>
                )}
                {dripping && dripping.drops > 0 && vessel.level_mm !== null && (
                  <ellipse
                    key={`ring-${dripping.drops}`}
                    className="ring"
                    cx={entryX}
                    cy={-vessel.level_mm}
                    rx="5"
                    ry="0.9"
                  />
                )}
              </>
            }
          />
          {over && (
            <span className="tipped" data-pouring={over.pouring || undefined} aria-hidden="true">
              <Bottle
                look={over.look}
                liquid={over.paint}
                level={over.level}
                tip={over.pouring ? 74 : 56}
                capped={false}
              />
            </span>
          )}
          {!over && dripping && (
            <span className="dropping" aria-hidden="true">
              <Dropper liquid={dripping.paint} />
            </span>
          )}
          {vessel.full && (
            <span className="full tape" aria-hidden="true">
              {vessel.full.text}
            </span>
          )}
          {vessel.stirrer && <Stirrer on={vessel.stirring} />}
        </span>
        <span className="vessel-name">
          <span className="tape tape-press" data-chosen={chosen || poised || undefined}>
            {vessel.name}
          </span>
        </span>
      </button>
      <Tag vessel={vessel} side={tagSide} settling={props.settling} />
      {props.beside}
      <span id={says} hidden>
        {words(describeVessel(vessel))}
      </span>
    </div>
  );
}

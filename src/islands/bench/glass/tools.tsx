import { memo } from 'react';
import type { Paint } from './light';

/** A dropper held aslant; its tip is the drawing's lower left. */
export const Dropper = memo(function Dropper({ liquid }: { liquid: Paint }) {
  return (
    <svg className="dropper" viewBox="0 0 92 108" aria-hidden="true">
      <g transform="rotate(38 6 102)">
        <path
          className="dropper-glass"
          d="M 2.6 34 L 2.6 74 C 2.6 84 5 88 5 102 L 7 102 C 7 88 9.4 84 9.4 74 L 9.4 34 Z"
        />
        <path
          d="M 3.6 56 L 3.6 74 C 3.6 84 5.6 88 5.6 100 L 6.4 100 C 6.4 88 8.4 84 8.4 74 L 8.4 56 Z"
          fill={liquid.fill}
        />
        <path className="dropper-marks" d="M 6 44 H 9.4 M 6 52 H 9.4 M 6 60 H 9.4" />
        <path
          className="dropper-bulb"
          d="M 0.5 36 L 0.5 26 C -3 20 -6 12 -4 4 C -2.6 -2.4 2 -4 6 -4 C 10 -4 14.6 -2.4 16 4 C 18 12 15 20 11.5 26 L 11.5 36 Z"
        />
        <path className="dropper-collar" d="M 0.5 29 H 11.5" />
      </g>
    </svg>
  );
});

/** A falling drop in the vessel's millimetres, its point at (0, 0). */
export function Drop({ liquid }: { liquid: Paint }) {
  return (
    <path
      className="drop"
      d="M 0 0 C 1 1.6 1.7 2.6 1.7 3.7 A 1.7 1.7 0 0 1 -1.7 3.7 C -1.7 2.6 -1 1.6 0 0 Z"
      fill={liquid.fill}
    />
  );
}

/** A combination electrode standing in a vessel, in the vessel's millimetres: its glass bulb at `foot_mm` above the floor. */
export const Probe = memo(function Probe({
  x,
  foot_mm,
  length_mm,
}: {
  x: number;
  foot_mm: number;
  length_mm: number;
}) {
  const top = -(foot_mm + length_mm);
  return (
    <g className="probe" transform={`translate(${x} 0)`}>
      <path className="probe-cable" d={`M 0 ${top - 9} C 0 ${top - 19} -11 ${top - 19} -12 ${top - 8}`} />
      <path
        className="probe-body"
        d={`M -2.6 ${top} V ${-foot_mm - 3.4} A 2.6 2.6 0 0 0 2.6 ${-foot_mm - 3.4} V ${top} Z`}
      />
      <path className="probe-core" d={`M 0 ${top + 2} V ${-foot_mm - 4}`} />
      <circle className="probe-bulb" cx="0" cy={-foot_mm - 2.6} r="1.5" />
      <rect className="probe-head" x="-3.6" y={top - 9} width="7.2" height="10" rx="1.6" />
    </g>
  );
});

/** A magnetic bar on the vessel's floor. */
export function StirBar({ turning }: { turning: boolean }) {
  return (
    <rect
      className={turning ? 'stir-bar stir-bar-turning' : 'stir-bar'}
      x="-5"
      y="-3.2"
      width="10"
      height="3"
      rx="1.5"
    />
  );
}

/** Height of the stirrer under a vessel, mm. */
export const STIRRER_MM = 9.7;

/** The stirrer that a vessel stands on. */
export const Stirrer = memo(function Stirrer({ on }: { on: boolean }) {
  return (
    <svg className="stirrer" viewBox="0 0 116 26" aria-hidden="true" preserveAspectRatio="none">
      <path className="stirrer-plate" d="M 8 1.5 H 108 V 6 H 8 Z" />
      <path className="stirrer-body" d="M 8 6 H 108 L 114 24.5 H 2 Z" />
      <circle className="stirrer-knob" cx="94" cy="15.5" r="5" />
      <path className="stirrer-pointer" d={on ? 'M 94 15.5 L 97 12.5' : 'M 94 15.5 V 11.5'} />
    </svg>
  );
});

import type { ReactNode } from 'react';
import { useWords } from '../../words';
import { AgainIcon, MoreIcon, UndoIcon, WarnIcon } from '../scene/icons';
import { HoldButton } from './HoldButton';
import { VolumeField } from './VolumeField';

export interface Choice {
  readonly id: string;
  readonly name: string;
  /** Concentration or strength. */
  readonly more: string;
}

/** A move besides pouring that the chosen vessel offers: swirl, stir, dip the probe. */
export interface Deed {
  readonly key: string;
  readonly label: string;
  readonly off?: string | undefined;
  readonly onDo: () => void;
}

export interface ApronProps {
  children?: ReactNode;
  /** The rarer moves of this bench, behind one button. */
  more: { readonly open: boolean; readonly onToggle: () => void } | null;
  variant: 'lesson' | 'home' | 'front';
  sources: readonly Choice[];
  targets: readonly Choice[];
  from: string;
  into: string;
  onFrom: (id: string) => void;
  onInto: (id: string) => void;
  running_uL: number | null;
  /** Nothing can be poured now: the sentence that says why. */
  blocked: string | null;
  volume_uL: number;
  most_uL: number;
  limit: string;
  deeds: readonly Deed[];
  canUndo: boolean;
  /** One sentence under the sentence row: a refusal, or what the hand can do next. */
  message: { readonly kind: 'refusal' | 'hint'; readonly text: string } | null;
  saving: ReactNode;
  onHold: (by: 'pointer' | 'keys') => void;
  onLetGo: () => void;
  onInterrupt: () => void;
  onCancel: () => void;
  onDrop: () => void;
  onVolume: (volume_uL: number) => void;
  onAdd: (volume_uL: number) => void;
  onUndo: () => void;
  onAgain: () => void;
}

/** The bench's front: a sentence that pours, in three equal ways. */
export function Apron(props: ApronProps) {
  const words = useWords();
  const off = props.blocked !== null || props.most_uL < 1;
  const hold = (
    <HoldButton
      off={off}
      running_uL={props.running_uL}
      onStart={props.onHold}
      onEnd={props.onLetGo}
      onInterrupt={props.onInterrupt}
      onCancel={props.onCancel}
    />
  );
  const drop = (
    <button
      type="button"
      className="button button-second drop-button"
      aria-disabled={off || undefined}
      onClick={() => !off && props.onDrop()}
    >
      One drop
    </button>
  );
  const again = (
    <button type="button" className="button button-quiet" onClick={props.onAgain}>
      <AgainIcon />
      Start again
    </button>
  );
  const source = props.sources.find((one) => one.id === props.from);
  if (props.variant === 'home') {
    return (
      <div className="apron apron-home" role="group" aria-label="Bench controls">
        <div className="sentence">
          <span className="sentence-word">
            Try it: {source && [source.name.toLowerCase(), source.more].filter(Boolean).join(' ')}, into
          </span>
          <Targets {...props} />
          {hold}
          {drop}
          <span className="apron-end">{again}</span>
        </div>
        <Message message={props.message} />
      </div>
    );
  }
  return (
    <div className="apron" role="group" aria-label="Bench controls">
      <div className="sentence">
        <span className="sentence-word">Pour</span>
        <Select label="What to pour" options={props.sources} value={props.from} onChange={props.onFrom} />
        <span className="sentence-word">into</span>
        <Select
          label="Into which vessel"
          options={props.targets}
          value={props.into}
          onChange={props.onInto}
          filled
        />
        <span className="apron-end">
          {props.deeds.map((deed) => (
            <button
              key={deed.key}
              type="button"
              className="button button-quiet"
              aria-disabled={deed.off !== undefined || undefined}
              title={deed.off}
              onClick={deed.onDo}
            >
              {deed.label}
            </button>
          ))}
          {props.more && (
            <button
              type="button"
              className="button button-quiet"
              aria-expanded={props.more.open}
              onClick={props.more.onToggle}
            >
              More moves
              <MoreIcon />
            </button>
          )}
        </span>
      </div>
      <div className="ways">
        <div className="way">
          {hold}
          <p className="under">stops when you let go</p>
        </div>
        <span className="or">or</span>
        <div className="way">
          {drop}
          <p className="under">{words('0.05 mL')}</p>
        </div>
        <span className="or">or</span>
        <VolumeField
          volume_uL={props.volume_uL}
          most_uL={props.most_uL}
          limit={props.limit}
          onChange={props.onVolume}
          onAdd={props.onAdd}
        />
        <span className="apron-end">
          <button
            type="button"
            className="button button-quiet"
            aria-disabled={!props.canUndo || undefined}
            onClick={() => props.canUndo && props.onUndo()}
          >
            <UndoIcon />
            Undo
          </button>
          {again}
        </span>
      </div>
      {props.children}
      <div className="apron-foot">
        <Message message={props.message} />
        {props.saving}
      </div>
    </div>
  );
}

const words = ({ name, more }: Choice): string => [name, more].filter(Boolean).join(' ');

function Select(props: {
  label: string;
  options: readonly Choice[];
  value: string;
  onChange: (id: string) => void;
  filled?: boolean;
}) {
  const shown = props.options.find((option) => option.id === props.value);
  return (
    <span className="tape tape-press tape-select" data-chosen={props.filled || undefined}>
      <span className="tape-select-words" aria-hidden="true">
        {shown && words(shown)}
        <MoreIcon />
      </span>
      <select
        aria-label={props.label}
        value={props.value}
        onChange={(event) => props.onChange(event.target.value)}
      >
        {props.options.map((option) => (
          <option key={option.id} value={option.id}>
            {words(option)}
          </option>
        ))}
      </select>
    </span>
  );
}

function Targets({ targets, into, onInto }: Pick<ApronProps, 'targets' | 'into' | 'onInto'>) {
  return (
    <span className="targets" role="group" aria-label="Into which vessel">
      {targets.map((target) => (
        <button
          key={target.id}
          type="button"
          className="tape tape-press"
          data-chosen={target.id === into || undefined}
          aria-pressed={target.id === into}
          onClick={() => onInto(target.id)}
        >
          the {target.name.toLowerCase()}
        </button>
      ))}
    </span>
  );
}

function Message({ message }: Pick<ApronProps, 'message'>) {
  return (
    <p className="message" data-kind={message?.kind}>
      {message?.kind === 'refusal' && <WarnIcon />}
      {message?.text}
    </p>
  );
}

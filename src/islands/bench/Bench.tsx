import { useCallback, useState, type ReactNode } from 'react';
import type { BenchSpec, Move } from '../../bench/types';
import './bench.css';
import { BenchView } from './BenchView';
import type { RunView } from './run';
import { Sheet } from './sheet/Sheet';
import { createBenchStore } from './store/index';

/** A run that the server or this browser kept. */
export interface KeptRun {
  readonly runId?: string;
  readonly seed: number;
  readonly moves: readonly Move[];
  readonly metAims: readonly string[];
  readonly predicted?: boolean;
}

export interface BenchProps {
  /** The lesson's id; runs hang on it. */
  lesson: string;
  spec: BenchSpec;
  run?: KeptRun;
  signedIn: boolean;
  /** Hazard marks by shelf id, from the reviewed data of each concentration; most dilute bottles have none. */
  hazards?: Readonly<Record<string, readonly string[]>>;
  variant?: 'lesson' | 'home';
  /** The home page's words, on the wall beside the vessels. */
  children?: ReactNode;
}

const SAVING_WORDS: Record<RunView['saving'], string> = {
  local: 'On this page only',
  saving: 'Saving',
  saved: 'Saved',
  offline: 'Not connected. Your moves are kept here and sent later.',
  conflict: 'This bench was worked on somewhere else, too.',
  full: 'This run is full. Start a new one to go on.',
};

/** A bench as an island: `client:visible`, or rendered on the server alone as a still picture with its words. */
export function Bench({ lesson, spec, run, signedIn, hazards, variant = 'lesson', children }: BenchProps) {
  const [store] = useState(() =>
    createBenchStore({
      lesson,
      spec,
      signedIn,
      ...(run
        ? { seed: run.seed, moves: run.moves, metAims: run.metAims, predicted: run.predicted ?? false }
        : {}),
    }),
  );
  const sheet = useCallback(
    (now: RunView, vessel: string) => <Sheet spec={spec} run={now} vessel={vessel} asksServer={signedIn} />,
    [spec, signedIn],
  );
  return (
    <BenchView
      spec={spec}
      store={store}
      variant={variant}
      hazardsOf={(item) => hazards?.[item.id] ?? []}
      savingWords={(now) => SAVING_WORDS[now.saving]}
      sheet={variant === 'lesson' ? sheet : undefined}
    >
      {children}
    </BenchView>
  );
}

export default Bench;

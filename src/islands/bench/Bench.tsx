import { useState, type ReactNode } from 'react';
import { useStore } from 'zustand';
import type { BenchSpec } from '../../bench/types';
import { USUAL, type Conventions } from '../../lessons/conventions';
import { ReaderProvider } from '../words';
import './bench.css';
import { BenchView } from './BenchView';
import type { RunView } from './run';
import { Sheet } from './sheet/Sheet';
import { createBenchStore } from './store/index';
import { WorkQuestions } from './sync/WorkQuestions';
import { workFor, type GivenWork, type Work } from './sync/work';

export interface BenchProps {
  spec: BenchSpec;
  /** What the server holds of this person's work here; absent where nothing is kept (the home page). */
  given?: GivenWork;
  /** Hazard marks by shelf id, from the reviewed data of each concentration; most dilute bottles have none. */
  hazards?: Readonly<Record<string, readonly string[]>>;
  variant?: 'lesson' | 'home';
  /** How its reader writes numbers and units. */
  conventions?: Conventions;
  /** The home page's words, on the wall beside the vessels. */
  children?: ReactNode;
}

const SAVING_WORDS: Record<RunView['saving'], string> = {
  local: 'Kept in this browser',
  saving: 'Saving',
  saved: 'Saved',
  offline: 'Not connected. Your moves are kept here and sent later.',
  conflict: 'This bench was worked on somewhere else, too.',
  full: 'This run is full. Begin a new one to go on.',
};

/** A bench as an island: `client:visible`, or rendered on the server alone as a still picture with its words. */
export function Bench({
  spec,
  given,
  hazards,
  variant = 'lesson',
  conventions = USUAL,
  children,
}: BenchProps) {
  const [work] = useState<Work | undefined>(() => (given ? workFor(given) : undefined));
  const [store] = useState(() => createBenchStore({ spec, work }));
  return (
    <ReaderProvider value={conventions}>
      {work && <Questions work={work} />}
      <BenchView
        spec={spec}
        store={store}
        variant={variant}
        hazardsOf={(item) => hazards?.[item.id] ?? []}
        savingWords={(now) => (given ? SAVING_WORDS[now.saving] : '')}
        sheet={
          variant === 'lesson'
            ? (now, vessel) => (
                <Sheet spec={spec} run={now} vessel={vessel} asksServer={given?.person != null} />
              )
            : undefined
        }
      >
        {children}
      </BenchView>
    </ReaderProvider>
  );
}

function Questions({ work }: { work: Work }) {
  const { strangers, saving, word } = useStore(work.store);
  return <WorkQuestions work={work} strangers={strangers} saving={saving} word={word} />;
}

export default Bench;

import { lazy, Suspense, useMemo, useState } from 'react';
import type { BenchSpec, BenchState, Seen, ViewKind } from '../../../bench/types';
import type { RunView } from '../run';
import { Aims } from './Aims';
import { NotebookTable } from './NotebookTable';
import { PairBar } from './PairBar';
import { aimsOf, notesOf, pairOf, traceOf } from './sheetLooks';
import { Trace } from './Trace';

const MoleLedger = lazy(() => import('./MoleLedger'));
const SpeciesBars = lazy(() => import('./SpeciesBars'));

const NAMES: Partial<Record<ViewKind, string>> = {
  'pair-bar': 'Pair bar',
  ledger: 'Mole ledger',
  species: 'Species bars',
};
const AT_ONCE = 2;

/** The first state of a run: the set-up. */
function startOf(state: BenchState): BenchState {
  let first = state;
  while (first.before) first = first.before;
  return first;
}

interface Props {
  spec: BenchSpec;
  run: RunView;
  /** The vessel that the sentence names; the views show it. */
  vessel: string;
  asksServer: boolean;
}

/** One porcelain sheet under the bench: aims, notebook and trace, then at most two further views of the same liquid. */
export function Sheet({ spec, run, vessel, asksServer }: Props) {
  const { state, predicted, metAims, locallyMet } = run;
  const seen = useMemo<Seen>(
    () => ({ predicted: predicted === true, metAims: [...metAims, ...locallyMet] }),
    [predicted, metAims, locallyMet],
  );
  const offered = (Object.keys(NAMES) as ViewKind[]).filter(
    (view) => spec.views === undefined || spec.views.includes(view),
  );
  const [open, setOpen] = useState<readonly ViewKind[]>(offered.slice(0, 1));
  const start = useMemo(() => startOf(state), [state]);
  const notes = useMemo(() => notesOf(spec, state, seen), [spec, state, seen]);
  const traced = useMemo(() => traceOf(spec, state, seen), [spec, state, seen]);
  // The named vessel's pair; where it holds none, the first that there is.
  const pair = useMemo(() => {
    for (const id of [vessel, ...spec.vessels.map((one) => one.id)]) {
      const found = pairOf(spec, state, start, id, seen);
      if (found) return found;
    }
    return null;
  }, [spec, state, start, vessel, seen]);
  const aims = aimsOf(spec, run.readings, run.metAims, run.locallyMet, asksServer);
  const showsTrace = spec.views === undefined || spec.views.includes('trace');
  const toggle = (view: ViewKind) =>
    setOpen((now) =>
      now.includes(view) ? now.filter((one) => one !== view) : [...now, view].slice(-AT_ONCE),
    );
  return (
    <div className="sheet">
      <div>
        {aims.length > 0 && <Aims aims={aims} />}
        <NotebookTable notes={notes} moved={state.count > 0} />
      </div>
      {showsTrace && <Trace {...traced} strip={NO_STRIP} />}
      {offered.length > 0 && (
        <div className="sheet-views">
          <div className="view-choice" role="group" aria-label="Further views, two at once">
            {offered.map((view) => (
              <button
                key={view}
                type="button"
                className="tape tape-press"
                data-chosen={open.includes(view) || undefined}
                aria-pressed={open.includes(view)}
                onClick={() => toggle(view)}
              >
                {NAMES[view]}
              </button>
            ))}
          </div>
          <div className="sheet-views-row" data-equal>
            {open.map((view) => {
              if (view === 'pair-bar') return <PairBar key={view} pair={pair} />;
              // Only what is fetched waits: a boundary around the rest would make the server send inline scripts.
              const View = view === 'ledger' ? MoleLedger : SpeciesBars;
              return (
                <Suspense key={view} fallback={<p className="empty">Fetching the view</p>}>
                  <View state={state} vessel={vessel} seen={seen} />
                </Suspense>
              );
            })}
          </div>
        </div>
      )}
    </div>
  );
}

const NO_STRIP: readonly string[] = [];

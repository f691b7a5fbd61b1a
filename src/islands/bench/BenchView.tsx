import { lazy, Suspense, useCallback, useEffect, useState, type ReactNode } from 'react';
import { useStore } from 'zustand';
import { describe } from '../../bench/describe';
import type { BenchSpec, Move } from '../../bench/types';
import { Apron, type Choice } from './apron/Apron';
import { delivery, moreKinds, quickDeeds } from './apron/deeds';
import { BenchScene } from './BenchScene';
import { DROP_UL, formatVolume } from './hand/volume';
import { useHand } from './hand/useHand';
import type { Pourable } from './hand/store';
import type { RunStore, RunView } from './run';
import { createLooks, type Looks } from './scene/looksOf';
import { AgainDialog } from './words/AgainDialog';
import { useLiveRegion } from './words/LiveRegion';
import { added, reading } from './words/sentences';
import { Toast, type ToastWords } from './words/Toast';

const MoreDeeds = lazy(() => import('./apron/MoreDeeds'));

/** The sentence may name both vessels at once: the same goes into each, in one move. */
export const BOTH = 'both vessels';

interface Props {
  spec: BenchSpec;
  store: RunStore;
  variant: 'lesson' | 'home';
  /** The marks that a bottle's concentration carries. */
  hazardsOf: (item: BenchSpec['shelf'][number]) => readonly string[];
  /** What stands below the apron. */
  sheet: (run: RunView, vessel: string) => ReactNode;
  savingWords: (run: RunView) => string;
}

const DROPPER_STAYS_MS = 1600;
const SETTLE_MS = 600;

export function BenchView({ spec, store, variant, hazardsOf, sheet, savingWords }: Props) {
  const run = useStore(store);
  const [looksOf] = useState(() => createLooks(spec, hazardsOf));
  const looks = looksOf(run.readings);
  const { vessels, shelf } = looks;
  const [from, setFrom] = useState(shelf[0]?.id ?? '');
  const [into, setInto] = useState(vessels[0]?.id ?? '');
  const [volume_uL, setVolume] = useState(1000);
  const [asking, setAsking] = useState(false);
  const [more, setMore] = useState(false);
  const [toast, setToast] = useState<ToastWords | null>(null);
  const [settling, setSettling] = useState<string | null>(null);
  const [dripping, setDripping] = useState<{ from: string; into: string; drops: number } | null>(null);
  const [say, liveRegion] = useLiveRegion();

  /** Does a move; true when the bench took it. A refusal is a sentence under the apron and in the live region. */
  const act = useCallback(
    (move: Move): boolean => {
      const before = store.getState().moves.length;
      store.getState().act(move);
      const after = store.getState();
      if (after.refusal) say(after.refusal.sentence);
      return after.refusal === undefined && (after.moves.length !== before || after.readings !== run.readings);
    },
    [store, say, run.readings],
  );

  const lookAt = useCallback((id: string) => looksOf(store.getState().readings).vessels.find(vessel => vessel.id === id), [looksOf, store]);
  const settle = useCallback((id: string) => setSettling(id), []);
  useEffect(() => {
    if (settling === null) return;
    const timer = window.setTimeout(() => setSettling(null), SETTLE_MS);
    return () => window.clearTimeout(timer);
  }, [settling]);

  const [pourable] = useState<Pourable>(() => ({
    startPour: (source, target) => store.getState().startPour(source, target),
    growPour: wanted_uL => {
      const before = store.getState();
      if (before.pouring === undefined) return false;
      before.growPour(wanted_uL);
      const { pouring, refusal } = store.getState();
      return refusal === undefined && pouring !== undefined && pouring.volume_uL >= wanted_uL;
    },
    endPour: () => {
      const { pouring, endPour } = store.getState();
      endPour();
      if (!pouring) {
        const { refusal } = store.getState();
        if (refusal) say(refusal.sentence);
        return;
      }
      const vessel = lookAt(pouring.into);
      settle(pouring.into);
      if (vessel) say(`${added(pouring.volume_uL, vessel)}${vessel.full ? ` ${vessel.name} is full.` : ''}`);
    },
    cancelPour: () => {
      store.getState().cancelPour();
      say('Nothing poured');
    },
  }));

  const drip = useCallback(
    (source: string, target: string) => {
      const done =
        target === BOTH
          ? act({ kind: 'addToBoth', from: source, into: [vessels[0]!.id, vessels[1]!.id], drops: 1 })
          : act({ kind: 'drip', from: source, into: target, drops: 1 });
      if (!done) return;
      setDripping(before => ({ from: source, into: target, drops: (before?.into === target ? before.drops : 0) + 1 }));
      const vessel = lookAt(target);
      if (vessel) say(`One drop added. ${reading(vessel)}`);
      settle(target);
    },
    [act, lookAt, say, settle, vessels],
  );
  useEffect(() => {
    if (dripping === null) return;
    const timer = window.setTimeout(() => setDripping(null), DROPPER_STAYS_MS);
    return () => window.clearTimeout(timer);
  }, [dripping]);

  const hands = useHand(pourable, drip);
  const { hand, dispatch } = hands;

  const add = (amount_uL: number) => {
    const done =
      into === BOTH
        ? act({ kind: 'addToBoth', from, into: [vessels[0]!.id, vessels[1]!.id], volume_uL: amount_uL })
        : act(delivery(spec, from, into, amount_uL));
    if (!done) return;
    const vessel = lookAt(into);
    if (vessel) say(added(amount_uL, vessel));
    settle(into);
  };

  const undo = () => {
    const before = store.getState();
    const last = standingMove(before);
    before.undo();
    const { refusal } = store.getState();
    if (refusal) {
      say(refusal.sentence);
      return;
    }
    if (!last) return;
    const words = tookBack(last, vessels);
    say(words);
    setToast(seen => ({
      n: (seen?.n ?? 0) + 1,
      text: words,
      action: {
        label: 'Put it back',
        onDo: () => {
          setToast(null);
          act(last);
        },
      },
    }));
  };

  const deeds = quickDeeds(spec, run.readings, into === BOTH ? '' : into);
  const hasMore = variant === 'lesson' && moreKinds(spec).length > 0;
  const sources: Choice[] = [
    ...shelf.map(item => ({ id: item.id, name: [item.name, item.strength].filter(Boolean).join(' ') })),
    ...vessels.filter(vessel => vessel.level_mm !== null && variant === 'lesson').map(vessel => ({ id: vessel.id, name: vessel.name })),
  ];
  const targets: Choice[] = [
    ...vessels.map(vessel => ({ id: vessel.id, name: vessel.name })),
    ...(vessels.length === 2 && variant === 'lesson' ? [{ id: BOTH, name: 'both' }] : []),
  ];
  const source = shelf.find(item => item.id === from);
  const target = vessels.find(vessel => vessel.id === into);
  const stock_uL = source?.left_uL ?? vessels.find(vessel => vessel.id === from)?.volume_uL ?? Number.POSITIVE_INFINITY;
  const room_uL = into === BOTH ? Math.min(...vessels.map(vessel => vessel.room_uL ?? Number.POSITIVE_INFINITY)) : (target?.room_uL ?? Number.POSITIVE_INFINITY);
  const most_uL = Math.min(stock_uL, room_uL, 2_000_000);

  const hint =
    hand.at === 'picked'
      ? 'Now choose a vessel.'
      : hand.at === 'poised'
        ? 'Hold to pour, tap for one drop. Escape puts the bottle back.'
        : null;

  return (
    <section className="bench" data-variant={variant} aria-labelledby={`${spec.id}-title`}>
      <div className="bench-frame">
        <div className="bench-body">
          <BenchScene
            id={spec.id}
            title={spec.title}
            lead={spec.intro ?? null}
            model={`${spec.model === 'textbook' ? 'Textbook model' : 'Model with activities'}, ${spec.temperature_C} °C`}
            description={describe(run.readings)}
            vessels={vessels}
            shelf={shelf}
            from={from}
            into={into}
            hands={hands}
            dripping={dripping}
            settling={settling}
            onFrom={setFrom}
            onInto={setInto}
            say={say}
          />
          <Apron
            variant={variant}
            sources={sources}
            targets={targets}
            from={from}
            into={into}
            onFrom={setFrom}
            onInto={setInto}
            running_uL={hand.at === 'pouring' ? (run.pouring?.volume_uL ?? 0) : null}
            blocked={into === BOTH ? 'A bottle is held over one vessel at a time.' : null}
            volume_uL={volume_uL}
            most_uL={most_uL}
            limit={limitSentence(stock_uL, room_uL, target?.name ?? 'both')}
            deeds={deeds.map(deed => ({
              key: deed.key,
              label: deed.label,
              onDo: () => {
                if (act(deed.move)) say(deed.label);
              },
            }))}
            canUndo={standingMove(run) !== null}
            message={
              run.refusal
                ? { kind: 'refusal', text: run.refusal.sentence }
                : hint
                  ? { kind: 'hint', text: hint }
                  : noticeOf(run)
            }
            saving={<p className="saving">{savingWords(run)}</p>}
            more={hasMore ? { open: more, onToggle: () => setMore(open => !open) } : null}
            onHold={by => dispatch({ kind: 'hold', from, into, by })}
            onLetGo={() => dispatch({ kind: 'letGo' })}
            onInterrupt={() => dispatch({ kind: 'interrupt' })}
            onCancel={() => dispatch({ kind: 'cancel' })}
            onDrop={() => drip(from, into)}
            onVolume={setVolume}
            onAdd={add}
            onUndo={undo}
            onAgain={() => setAsking(true)}
          >
            {more && (
              <Suspense fallback={<p className="under">Fetching the other moves</p>}>
                <MoreDeeds
                  spec={spec}
                  from={from}
                  into={into}
                  onClose={() => setMore(false)}
                  onDo={move => {
                    if (act(move)) say('Done');
                  }}
                />
              </Suspense>
            )}
          </Apron>
          {sheet(run, into === BOTH ? (vessels[1]?.id ?? '') : into)}
        </div>
      </div>
      {liveRegion}
      <Toast toast={toast} onGone={() => setToast(null)} />
      <AgainDialog
        open={asking}
        moves={run.moves.length}
        onKeep={() => setAsking(false)}
        onAgain={() => {
          setAsking(false);
          dispatch({ kind: 'cancel' });
          store.getState().startAgain();
          say('The bench stands as it did at the start');
        }}
      />
    </section>
  );
}

function noticeOf(run: RunView): { kind: 'refusal' | 'hint'; text: string } | null {
  const notice = run.readings.spills[0] ?? run.readings.notices.find(one => one.kind !== 'said') ?? run.readings.notices[0];
  return notice ? { kind: 'hint', text: notice.sentence } : null;
}

/** The newest move that still stands, or null at the start. */
function standingMove(run: RunView): Move | null {
  let state: RunView['state'] | null = run.state;
  while (state?.move?.kind === 'undo') state = state.before?.back ?? null;
  return state?.move ?? null;
}

function tookBack(move: Move, vessels: Looks['vessels']): string {
  const name = (id: string) => vessels.find(vessel => vessel.id === id)?.name.toLowerCase() ?? 'vessel';
  switch (move.kind) {
    case 'pour':
    case 'dispense':
      return `Took back ${formatVolume(move.volume_uL)} mL from the ${name(move.into)}.`;
    case 'drip':
    case 'addIndicator':
      return `Took back ${move.drops === 1 ? 'one drop' : `${move.drops} drops`}, ${formatVolume(move.drops * DROP_UL)} mL, from the ${name(move.into)}.`;
    default:
      return 'Took back the last move.';
  }
}

function limitSentence(stock_uL: number, room_uL: number, target: string): string {
  if (room_uL < 1) return `${target} is full.`;
  if (stock_uL < 1) return 'Nothing is left to pour.';
  return stock_uL < room_uL ? `Only ${formatVolume(stock_uL)} mL is left.` : `Only ${formatVolume(room_uL)} mL fits.`;
}

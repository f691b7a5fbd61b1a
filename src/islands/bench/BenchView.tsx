import { lazy, Suspense, useMemo, useState, type ReactNode } from 'react';
import { describe } from '../../bench/describe';
import type { BenchSpec, ShelfItem } from '../../bench/types';
import { useWords } from '../words';
import { Apron, type ApronProps, type Choice } from './apron/Apron';
import { moreKinds, quickDeeds } from './apron/deeds';
import { BenchScene } from './BenchScene';
import type { RunStore, RunView } from './run';
import type { Looks } from './scene/looksOf';
import { BOTH, standingMove, useBench } from './useBench';
import { AgainDialog } from './words/AgainDialog';
import { limitSentence } from './words/sentences';
import { Toast } from './words/Toast';

const MoreDeeds = lazy(() => import('./apron/MoreDeeds'));

/** A move holds this much at most, µL. */
const MOST_UL = 2_000_000;

interface Props {
  spec: BenchSpec;
  store: RunStore;
  variant: 'lesson' | 'home';
  /** The marks that a bottle's concentration carries. */
  hazardsOf: (item: ShelfItem) => readonly string[];
  savingWords: (run: RunView) => string;
  /** What stands below the apron, for the vessel that the sentence names. */
  sheet?: (run: RunView, vessel: string) => ReactNode;
  /** The home page's words, on the wall beside the vessels. */
  children?: ReactNode;
}

/** Scene, apron and sheet of one bench. */
export function BenchView({ spec, store, variant, hazardsOf, savingWords, sheet, children }: Props) {
  const bench = useBench(spec, store, hazardsOf);
  const { run, looks, hands, from, into, act, say } = bench;
  const { vessels, shelf } = looks;
  const { hand, dispatch } = hands;
  const words = useWords();
  const [asking, setAsking] = useState(false);
  const [more, setMore] = useState(false);
  const lesson = variant === 'lesson';
  // While something flows, the words wait: tags and the running volume tell it, and the rest is said when it ends.
  const [told, setTold] = useState(run);
  if (!run.pouring && told !== run) setTold(run);
  const description = useMemo(() => describe(told.readings).map(words), [told.readings, words]);
  const sheetVessel = into === BOTH ? (vessels[1]?.id ?? '') : into;
  const below = useMemo(() => sheet?.(told, sheetVessel), [sheet, told, sheetVessel]);

  const stock_uL =
    shelf.find((item) => item.id === from)?.left_uL ??
    vessels.find((vessel) => vessel.id === from)?.volume_uL ??
    Number.POSITIVE_INFINITY;
  const taking = vessels.filter((vessel) => into === BOTH || vessel.id === into);
  const room_uL = Math.min(...taking.map((vessel) => vessel.room_uL ?? Number.POSITIVE_INFINITY));

  return (
    <section
      id={`bench-${spec.id}`}
      className="bench"
      data-variant={variant}
      aria-labelledby={`${spec.id}-title`}
    >
      <div className="bench-frame">
        <div className="bench-body">
          <BenchScene
            id={spec.id}
            title={spec.title}
            lead={spec.intro ?? null}
            model={modelWords(spec)}
            description={description}
            vessels={vessels}
            shelf={shelf}
            from={from}
            into={into}
            hands={hands}
            dripping={bench.dripping}
            settling={bench.settling}
            onFrom={bench.setFrom}
            onInto={bench.setInto}
            say={say}
            words={children}
          />
          <Apron
            variant={variant}
            sources={sources(looks, lesson)}
            targets={targets(looks, lesson)}
            from={from}
            into={into}
            onFrom={bench.setFrom}
            onInto={bench.setInto}
            running_uL={hand.at === 'pouring' ? (run.pouring?.volume_uL ?? 0) : null}
            blocked={into === BOTH ? 'A bottle is held over one vessel at a time.' : null}
            volume_uL={bench.volume_uL}
            most_uL={Math.min(stock_uL, room_uL, MOST_UL)}
            limit={words(
              limitSentence(stock_uL, room_uL, taking.length === 1 ? taking[0]!.name : 'One of them'),
            )}
            deeds={quickDeeds(spec, run.readings, into).map((deed) => ({
              key: deed.key,
              label: deed.label,
              onDo: () => {
                if (act(deed.move)) say(deed.label);
              },
            }))}
            canUndo={standingMove(run) !== null}
            message={messageOf(run, hand.at, words)}
            saving={<p className="saving">{savingWords(run)}</p>}
            more={
              lesson && moreKinds(spec).length > 0
                ? { open: more, onToggle: () => setMore((open) => !open) }
                : null
            }
            onHold={(by) => dispatch({ kind: 'hold', from, into, by })}
            onLetGo={() => dispatch({ kind: 'letGo' })}
            onInterrupt={() => dispatch({ kind: 'interrupt' })}
            onCancel={() => dispatch({ kind: 'cancel' })}
            onDrop={() => bench.drip(from, into)}
            onVolume={bench.setVolume}
            onAdd={bench.add}
            onUndo={bench.undo}
            onAgain={() =>
              run.moves.length > 0 ? setAsking(true) : say('The bench stands as it did at the start')
            }
          >
            {more && (
              <Suspense fallback={<p className="under">Fetching the other moves</p>}>
                <MoreDeeds
                  spec={spec}
                  from={from}
                  into={into === BOTH ? (vessels[0]?.id ?? '') : into}
                  onClose={() => setMore(false)}
                  onDo={(move) => {
                    if (act(move)) say('Done');
                  }}
                />
              </Suspense>
            )}
          </Apron>
          {below}
        </div>
      </div>
      {bench.liveRegion}
      <Toast toast={bench.toast} onGone={() => bench.setToast(null)} />
      <AgainDialog
        open={asking}
        moves={run.moves.length}
        onKeep={() => setAsking(false)}
        onAgain={() => {
          setAsking(false);
          bench.startAgain();
        }}
      />
    </section>
  );
}

/** Every number names the model that it was computed with. */
function modelWords(spec: BenchSpec): string {
  return `${spec.model === 'textbook' ? 'Textbook model' : 'Model with activities'}, ${spec.temperature_C} °C`;
}

function sources({ shelf, vessels }: Looks, lesson: boolean): Choice[] {
  return [
    ...shelf.map((item) => ({ id: item.id, name: item.name, more: item.strength })),
    ...(lesson ? vessels.filter((vessel) => vessel.level_mm !== null) : []).map((vessel) => ({
      id: vessel.id,
      name: vessel.name,
      more: '',
    })),
  ];
}

function targets({ vessels }: Looks, lesson: boolean): Choice[] {
  const named = vessels.map((vessel) => ({ id: vessel.id, name: vessel.name, more: '' }));
  return lesson && vessels.length === 2 ? [...named, { id: BOTH, name: 'both', more: '' }] : named;
}

/** The sentence under the ways to pour: why not, else what the hand can do next, else what happened. */
function messageOf(run: RunView, hand: string, words: (text: string) => string): ApronProps['message'] {
  if (run.refusal) return { kind: 'refusal', text: words(run.refusal.sentence) };
  if (hand === 'picked') return { kind: 'hint', text: 'Now choose a vessel.' };
  if (hand === 'poised') {
    return { kind: 'hint', text: 'Hold to pour, tap for one drop. Escape puts the bottle back.' };
  }
  const { spills, notices } = run.readings;
  const notice = spills[0] ?? notices.find((one) => one.kind !== 'said') ?? notices[0];
  return notice ? { kind: 'hint', text: words(notice.sentence) } : null;
}

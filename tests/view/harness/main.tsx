import { useState } from 'react';
import { createRoot } from 'react-dom/client';
import '@fontsource/nunito/latin-400.css';
import '@fontsource/nunito/latin-600.css';
import '@fontsource/nunito/latin-700.css';
import '@fontsource/nunito/latin-800.css';
import '../../../src/islands/bench/bench.css';
import { Apron } from '../../../src/islands/bench/apron/Apron';
import { BenchScene } from '../../../src/islands/bench/BenchScene';
import { glassware, levelOf, type GlassId } from '../../../src/bench/glassware';
import { shapeOf } from '../../../src/islands/bench/glass/shapeOf';
import { paint } from '../../../src/islands/bench/glass/light';
import { useHand } from '../../../src/islands/bench/hand/useHand';
import type { ShelfLook, VesselLook } from '../../../src/islands/bench/scene/looks';
import { Aims } from '../../../src/islands/bench/sheet/Aims';
import { NotebookTable } from '../../../src/islands/bench/sheet/NotebookTable';
import { Trace } from '../../../src/islands/bench/sheet/Trace';
import { PairBar } from '../../../src/islands/bench/sheet/PairBar';
import { IndicatorRuler } from '../../../src/islands/bench/sheet/IndicatorRuler';

const style = document.createElement('style');
style.textContent =
  '*{box-sizing:border-box}body{margin:0;font-family:Nunito;background:#f6f5f3}button{color:inherit}';
document.head.append(style);

const query = new URLSearchParams(location.search);
const glasses = (query.get('glass') ?? 'beaker-100').split(',') as GlassId[];
const green = { hex: '#44987f', words: 'blue-green' };
const yellow = { hex: '#f7d656', words: 'yellow' };
const levelAt = (g: GlassId, uL: number) => levelOf(glassware[g], uL / 1000) * 10 * shapeOf(g).squash;
const mk = (
  id: string,
  name: string,
  c: { hex: string; words: string },
  pH: string,
  g: GlassId,
): VesselLook => ({
  id,
  name,
  shape: shapeOf(g),
  level_mm: levelAt(g, glassware[g].nominal_mL * 550),
  volume_uL: glassware[g].nominal_mL * 550,
  doubt: null,
  mixed: true,
  stoppered: false,
  paint: paint(c),
  hex: c.hex,
  words: c.words,
  ph: { kind: 'value', text: pH },
  temperature_C: null,
  unmixed: null,
  probe: !query.has('noprobe'),
  stirrer: false,
  stirring: false,
  full: null,
});
const shelf: ShelfLook[] = [
  {
    id: 'hcl',
    name: 'Hydrochloric acid',
    strength: '0.10 mol/L',
    hazards: [],
    kind: 'reagent',
    paint: paint(null),
    level: 1,
    left_uL: 1e6,
  },
  {
    id: 'naoh',
    name: 'Sodium hydroxide',
    strength: '0.10 mol/L',
    hazards: ['GHS05'],
    kind: 'reagent',
    paint: paint(null),
    level: 0.8,
    left_uL: 1e6,
  },
  {
    id: 'bcg',
    name: 'Bromocresol green',
    strength: '0.1 %',
    hazards: [],
    kind: 'indicator',
    paint: paint({ hex: '#1b5e9e', words: 'blue' }),
    level: 0.9,
    left_uL: 1e6,
  },
  {
    id: 'wash',
    name: 'Wash bottle',
    strength: 'boiled water',
    hazards: [],
    kind: 'wash',
    paint: paint(null),
    level: 0.9,
    left_uL: 1e6,
  },
];
const count = Number(query.get('n') ?? 2);

function App() {
  const [vol, setVol] = useState(1000);
  const [from, setFrom] = useState('hcl');
  const [into, setInto] = useState('v1');
  const [level, setLevel] = useState(55000);
  const [base, setBase] = useState(0);
  const [drops, setDrops] = useState(0);
  const [run, setRun] = useState<number | null>(null);
  const hands = useHand(
    {
      startPour: () => setRun(0),
      growPour: (v) => {
        setRun(v);
        setBase(v);
        return level + v < 100000;
      },
      endPour: () => {
        setRun(null);
      },
      cancelPour: () => {
        setBase(0);
        setRun(null);
      },
    },
    () => setDrops((d) => d + 1),
  );
  const vessels = Array.from({ length: count }, (_, i) => {
    const v = mk(
      `v${i}`,
      ['Water', 'Ethanoate buffer', 'Third', 'Fourth', 'Fifth', 'Sixth'][i % 6]!,
      i % 2 ? green : yellow,
      i % 2 ? '4.67' : '2.04',
      glasses[i % glasses.length]!,
    );
    return v.id === into && glasses.length === 1
      ? { ...v, volume_uL: level + base, level_mm: levelAt(glasses[0]!, level + base) }
      : v;
  });
  return (
    <div className="bench" style={{ marginLeft: innerWidth > 1000 ? 112 : 0 }}>
      <div className="bench-frame">
        <div className="bench-body">
          <BenchScene
            id="b"
            title="Water or buffer?"
            lead="Same acid, same volume. Which one notices?"
            vessels={vessels}
            shelf={shelf}
            from={from}
            into={into}
            hands={hands}
            dripping={drops > 0 ? { into, from, drops } : null}
            settling={null}
            onFrom={setFrom}
            onInto={setInto}
            say={() => {}}
          />
          <Apron
            variant={query.has('home') ? 'home' : 'lesson'}
            sources={shelf.map((s) => ({ id: s.id, name: `${s.name} ${s.strength}` }))}
            targets={vessels}
            from={from}
            into={into}
            onFrom={setFrom}
            onInto={setInto}
            running_uL={run}
            blocked={null}
            volume_uL={vol}
            most_uL={45000}
            limit="Only 45.00 mL fits."
            deeds={[{ key: 'swirl', label: 'Swirl', onDo: () => {} }]}
            canUndo
            message={null}
            saving={<p className="saving">Kept on this device</p>}
            onHold={(by) => hands.dispatch({ kind: 'hold', from, into, by })}
            onLetGo={() => hands.dispatch({ kind: 'letGo' })}
            onInterrupt={() => hands.dispatch({ kind: 'interrupt' })}
            onCancel={() => hands.dispatch({ kind: 'cancel' })}
            onDrop={() => setDrops((d) => d + 1)}
            onVolume={setVol}
            onAdd={(v) => setLevel((l) => l + v)}
            onUndo={() => {}}
            onAgain={() => {}}
          />
          {!query.has('home') && (
            <div className="sheet">
              <div>
                <Aims
                  aims={[
                    { id: 'a', text: 'Turn the water yellow', state: 'met', note: 'done' },
                    { id: 'b', text: 'Bring the buffer to pH 4.50 ± 0.02', state: 'next', note: 'now 4.67' },
                    { id: 'c', text: 'Make both equal', state: 'open', note: '' },
                  ]}
                />
                <NotebookTable
                  notes={[
                    {
                      n: 1,
                      vessel: 'Water',
                      what: 'acid 0.10 mol/L',
                      added: '1.00',
                      ph: '2.71',
                      hex: '#f7d656',
                      words: 'yellow',
                      struck: false,
                    },
                    {
                      n: 2,
                      vessel: 'Water',
                      what: 'acid 0.10 mol/L',
                      added: '1.00',
                      ph: '2.71',
                      hex: '#f7d656',
                      words: 'yellow',
                      struck: true,
                    },
                    {
                      n: 3,
                      vessel: 'Ethanoate buffer',
                      what: 'hydrochloric acid 0.10 mol/L',
                      added: '5.00',
                      ph: '4.67',
                      hex: '#44987f',
                      words: 'blue-green',
                      struck: false,
                    },
                  ]}
                />
              </div>
              <Trace
                series={[
                  {
                    id: 'w',
                    name: 'water',
                    points: [
                      [0, 7],
                      [0.05, 4],
                      [1, 2.7],
                      [2, 2.4],
                      [5, 2.04],
                    ].map(([x, y]) => ({ x_mL: x!, pH: y!, hex: '#f7d656' })),
                  },
                  {
                    id: 'b',
                    name: 'ethanoate buffer',
                    points: [
                      [0, 4.76],
                      [1, 4.74],
                      [2, 4.72],
                      [5, 4.67],
                    ].map(([x, y]) => ({ x_mL: x!, pH: y!, hex: '#44987f' })),
                  },
                ]}
                aims={[4.5]}
                strip={Array.from({ length: 56 }, (_, i) =>
                  i < 15 ? '#f7d656' : i < 22 ? '#44987f' : '#0f6cbf',
                )}
                added="acid added, mL"
                absent={null}
              />
              <div className="sheet-views">
                <div className="sheet-views-row">
                  <PairBar
                    pair={{
                      vessel: 'Ethanoate buffer',
                      acid: 'HA',
                      base: 'A⁻',
                      acid_mmol: 5.5,
                      base_mmol: 4.5,
                      startShare: 0.5,
                      pKa: 4.76,
                      roomForAcid_mmol: 3.59,
                      roomForBase_mmol: 4.59,
                      sentence:
                        'Room left: 35.9 mL of this acid, or 45.9 mL of sodium hydroxide 0.10 mol/L, before the pH leaves pKa ± 1.',
                    }}
                  />
                  <IndicatorRuler
                    ruler={{
                      indicator: 'Bromocresol green',
                      cells: Array.from({ length: 56 }, (_, i) =>
                        i < 15 ? '#f7d656' : i < 22 ? '#44987f' : '#0f6cbf',
                      ),
                      markers: [
                        { id: 'w', name: 'water', pH: 2.04 },
                        { id: 'b', name: 'buffer', pH: 4.67 },
                      ],
                      sentence: 'Yellow below 3.8, green between, blue above 5.4.',
                    }}
                  />
                </div>
              </div>
            </div>
          )}
        </div>
      </div>
    </div>
  );
}
createRoot(document.getElementById('root')!).render(<App />);

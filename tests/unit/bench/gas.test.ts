import { describe, expect, test } from 'vitest';
import type { BenchSpec } from '../../../src/bench/index.ts';
import { fullBench } from './benches.ts';
import { benchOf } from './driver.ts';

describe('gas', () => {
  test('R32 nitrogen takes the carbonate of aired water out, the faster the longer it is bubbled', () => {
    const spec: BenchSpec = {
      ...fullBench,
      model: 'real',
      vessels: [
        {
          id: 'glass',
          label: 'Glass',
          glass: 'beaker-100',
          probe: true,
          contents: { volume_mL: 50, water: 'aired' },
        },
      ],
    };
    const bench = benchOf(spec).expectPH('glass', 5.6, 0.05); // air-equilibrated water: 5.60 at 420 ppm (computed by an independent script)
    const pH = () => bench.vessel('glass').pH ?? NaN;
    let last = pH();
    for (let i = 0; i < 5; i++) {
      bench.do({ kind: 'bubble', vessel: 'glass', gas: 'nitrogen', seconds: 60 });
      expect(pH()).toBeGreaterThan(last);
      last = pH();
    }
    bench.do({ kind: 'bubble', vessel: 'glass', gas: 'nitrogen', seconds: 3600 }).expectPH('glass', 7, 0.02);
  });

  test('R32 a stopper keeps what is dissolved, and nothing is poured through it', () => {
    const open = benchOf(fullBench).do({ kind: 'dipProbe', vessel: 'open' });
    const free = open.vessel('open').pH ?? NaN;
    open
      .do({ kind: 'liftProbe' })
      .do({ kind: 'stopper', vessel: 'open', on: true })
      .refused({ kind: 'pour', from: 'acid', into: 'open', volume_uL: 1000 }, 'stoppered')
      .refused({ kind: 'bubble', vessel: 'open', gas: 'air', seconds: 10 }, 'stoppered')
      .refused({ kind: 'stopper', vessel: 'beaker', on: true }, 'wrong-vessel')
      .refused({ kind: 'stopper', vessel: 'open', on: true }, 'already-so')
      .do({ kind: 'stopper', vessel: 'open', on: false })
      .do({ kind: 'dipProbe', vessel: 'open' })
      .expectPH('open', free, 0.01);
  });
});

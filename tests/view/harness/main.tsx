import { StrictMode } from 'react';
import { createRoot } from 'react-dom/client';
import '@fontsource/nunito/latin-400.css';
import '@fontsource/nunito/latin-600.css';
import '@fontsource/nunito/latin-700.css';
import '@fontsource/nunito/latin-800.css';
import './page.css';
import '../../../src/islands/bench/bench.css';
import { BenchView } from '../../../src/islands/bench/BenchView';
import { Sheet } from '../../../src/islands/bench/sheet/Sheet';
import { spec } from './spec';
import { memoryStore } from './store';

const SEEN = { predicted: true };
const variant = new URLSearchParams(location.search).has('home') ? 'home' : 'lesson';

createRoot(document.getElementById('root')!).render(
  <StrictMode>
    <div style={{ marginLeft: innerWidth > 1000 && variant === 'lesson' ? 112 : 0 }}>
      <BenchView
        spec={spec}
        store={memoryStore(spec)}
        variant={variant}
        hazardsOf={() => []}
        sheet={(run, vessel) =>
          variant === 'home' ? null : (
            <Sheet spec={spec} run={run} seen={SEEN} vessel={vessel} asksServer={false} />
          )
        }
        savingWords={() => 'Kept on this device'}
      >
        {variant === 'home' ? <p className="hero">Pour it.<br/>Watch it.<br/>Work out why.</p> : undefined}
      </BenchView>
    </div>
  </StrictMode>,
);

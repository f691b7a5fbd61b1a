import { StrictMode } from 'react';
import { createRoot } from 'react-dom/client';
import '@fontsource/nunito/latin-400.css';
import '@fontsource/nunito/latin-600.css';
import '@fontsource/nunito/latin-700.css';
import '@fontsource/nunito/latin-800.css';
import './page.css';
import Bench from '../../../src/islands/bench/Bench';
import { spec } from './spec';

const variant = new URLSearchParams(location.search).has('home') ? 'home' : 'lesson';

createRoot(document.getElementById('root')!).render(
  <StrictMode>
    <div className={`page-${variant}`}>
      <Bench spec={spec} variant={variant}>
        {variant === 'home' ? (
          <p className="hero">
            Pour it.
            <br />
            Watch it.
            <br />
            Work out why.
          </p>
        ) : undefined}
      </Bench>
    </div>
  </StrictMode>,
);

import type { CSSProperties } from 'react';
import { glassware, levelOf } from '../../bench/glassware';
import type { Tube } from '../../lessons/questions/types';
import { Glass } from '../bench/glass/Glass';
import { paint } from '../bench/glass/light';
import { shapeOf } from '../bench/glass/shapeOf';
import { useWords } from '../words';

/** Both tubes are filled alike: what differs is what is compared. */
const VOLUME_ML = 13;
const PX_PER_MM = 1.2;

/** The learner's answer as a liquid, beside the one that was asked for. */
export function Poured({ yours, asked }: { yours: Tube; asked: Tube }) {
  return (
    <div className="poured" style={{ '--s': `${PX_PER_MM}px` } as CSSProperties}>
      <One tube={yours} />
      <One tube={asked} />
    </div>
  );
}

function One({ tube }: { tube: Tube }) {
  const words = useWords();
  const shape = shapeOf('test-tube');
  const pH = tube.pH === null ? null : words(tube.pH.toFixed(2).replace('-', '−'));
  const [whose, given] = tube.label.split(': ');
  return (
    <figure className="poured-tube">
      <Glass
        shape={shape}
        level_mm={levelOf(glassware['test-tube'], VOLUME_ML) * 10 * shape.squash}
        liquid={paint(tube)}
      />
      <figcaption>
        <span className="question-label">{whose}</span>
        {given !== undefined && given !== pH && <span>{given}</span>}
        {pH !== null && (
          <span className="poured-pH">
            <span>pH</span> <strong>{pH}</strong>
          </span>
        )}
        <span className="poured-colour">
          <span className="chip" style={{ background: paint(tube).fill }} />
          {tube.words}
        </span>
      </figcaption>
    </figure>
  );
}

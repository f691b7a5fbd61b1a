import { useId, useState, type FormEvent } from 'react';
import { glassware, marksOf } from '../../../bench/glassware';
import { moves } from '../../../bench/moves/registry';
import type { BenchSpec, Move } from '../../../bench/types';
import { moreKinds, type RestKind } from './deeds';

interface Props {
  spec: BenchSpec;
  from: string;
  into: string;
  onDo: (move: Move) => void;
  onClose: () => void;
}

/** The rarer moves of a bench, each as a short form that its own registered fields ask for. */
export default function MoreDeeds({ spec, from, into, onDo, onClose }: Props) {
  const kinds = moreKinds(spec);
  const [kind, setKind] = useState<RestKind>(kinds[0]!);
  const id = useId();
  const definition = moves[kind];
  const submit = (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    const data = new FormData(event.currentTarget);
    const move: Record<string, unknown> = { kind };
    for (const [field, asks] of Object.entries(definition.fields)) {
      const text = String(data.get(field) ?? '');
      move[field] = asks === 'on' ? text === 'on' : NUMBERS.has(asks) ? Number(text.replace(',', '.')) : text;
    }
    // The engine checks every field of what was typed and answers with a sentence.
    onDo(move as unknown as Move);
  };
  return (
    <form className="more" onSubmit={submit} aria-label="More moves">
      <label className="more-field">
        <span>Move</span>
        <select value={kind} onChange={(event) => setKind(event.target.value as RestKind)}>
          {kinds.map((one) => (
            <option key={one} value={one}>
              {moves[one].name}
            </option>
          ))}
        </select>
      </label>
      {Object.entries(definition.fields).map(([field, asks]) => (
        <Field key={`${kind}-${field}`} spec={spec} name={field} asks={asks} from={from} into={into} />
      ))}
      <button type="submit" className="button button-second" aria-describedby={`${id}-what`}>
        {definition.name}
      </button>
      <button type="button" className="button button-quiet" onClick={onClose}>
        Close
      </button>
      <p className="under" id={`${id}-what`}>
        {definition.label}
      </p>
    </form>
  );
}

const NUMBERS: ReadonlySet<string> = new Set([
  'mark',
  'pH',
  'temperature',
  'seconds',
  'reading',
  'volume',
  'drops',
]);

const WORDS: Record<string, string> = {
  source: 'From',
  vessel: 'Vessel',
  burette: 'Burette',
  pipette: 'Pipette',
  indicator: 'Indicator',
  wash: 'With',
  mark: 'Mark, mL',
  pH: 'Standard, pH',
  temperature: 'Temperature, °C',
  seconds: 'Time, s',
  gas: 'Gas',
  text: 'Words',
  reading: 'Reading, mL',
  on: 'Stopper',
};

function options(spec: BenchSpec, asks: string, into: string): { value: string; words: string }[] | null {
  const vessels = spec.vessels.map((vessel) => ({
    value: vessel.id,
    words: vessel.label,
    glass: vessel.glass,
  }));
  const bottles = spec.shelf.map((item) => ({
    value: item.id,
    words: item.label,
    kind: item.kind,
    standard_pH: item.standard_pH,
  }));
  switch (asks) {
    case 'vessel':
      return vessels;
    case 'source':
      return [...bottles, ...vessels];
    case 'burette':
      return vessels.filter((vessel) => glassware[vessel.glass].family === 'burette');
    case 'pipette':
      return vessels.filter((vessel) => glassware[vessel.glass].family === 'pipette');
    case 'indicator':
      return bottles.filter((bottle) => bottle.kind === 'indicator');
    case 'wash':
      return bottles.filter((bottle) => bottle.kind === 'wash' || bottle.kind === 'reagent');
    case 'pH':
      return bottles.flatMap((bottle) =>
        bottle.standard_pH === undefined
          ? []
          : [{ value: String(bottle.standard_pH), words: bottle.standard_pH.toFixed(2) }],
      );
    case 'mark': {
      const glass = spec.vessels.find((vessel) => vessel.id === into)?.glass;
      return glass
        ? marksOf(glassware[glass]).map((mark) => ({ value: String(mark.mL), words: String(mark.mL) }))
        : [];
    }
    case 'gas':
      return [
        { value: 'air', words: 'air' },
        { value: 'co2', words: 'carbon dioxide' },
        { value: 'nitrogen', words: 'nitrogen' },
      ];
    case 'on':
      return [
        { value: 'on', words: 'on' },
        { value: 'off', words: 'off' },
      ];
    default:
      return null;
  }
}

function Field({
  spec,
  name,
  asks,
  from,
  into,
}: {
  spec: BenchSpec;
  name: string;
  asks: string;
  from: string;
  into: string;
}) {
  const choices = options(spec, asks, into);
  const first = asks === 'vessel' ? into : asks === 'source' ? from : undefined;
  return (
    <label className="more-field">
      <span>{name === 'into' ? 'Into' : (WORDS[asks] ?? name)}</span>
      {choices ? (
        <select name={name} defaultValue={first}>
          {choices.map((choice) => (
            <option key={choice.value} value={choice.value}>
              {choice.words}
            </option>
          ))}
        </select>
      ) : (
        <input
          name={name}
          type="text"
          inputMode={asks === 'text' ? 'text' : 'decimal'}
          autoComplete="off"
          required
        />
      )}
    </label>
  );
}

/** Moves that write something down: a label on the tape, a reading of a burette. */
import { nameOf, withVessel } from './hands.ts';
import { define, refuse } from './kinds.ts';
import { on } from './on.ts';

export const LABEL_LENGTH = 40;

export const label = define<'label'>({
  kind: 'label',
  name: 'Label',
  label: 'Writes on the tape of a vessel.',
  key: 'l',
  fields: { vessel: 'vessel', text: 'text' },
  handlesLiquid: false,
  delivers: false,
  offered: () => true,
  check: (at, m) => {
    const found = on(at, m.vessel, false);
    if (!found.ok) return found.refusal;
    if (typeof m.text !== 'string' || m.text.length > LABEL_LENGTH || hasControl(m.text)) {
      return refuse('bad-value', `Write at most ${LABEL_LENGTH} characters on one line.`);
    }
    return null;
  },
  perform: (at, m) => ({
    scene: withVessel(at.scene, m.vessel, { label: m.text.trim() === '' ? null : m.text.trim() }),
    notices: [],
  }),
  tell: (at, m) =>
    m.text.trim() === ''
      ? `label of ${nameOf(at, m.vessel)} taken off`
      : `${nameOf(at, m.vessel)} labelled "${m.text.trim()}"`,
});

const hasControl = (text: string): boolean =>
  [...text].some((c) => c.charCodeAt(0) < 32 || c.charCodeAt(0) === 127);

export const enterReading = define<'enterReading'>({
  kind: 'enterReading',
  name: 'Enter reading',
  label: "Writes down what the learner reads at a burette's meniscus.",
  key: 'e',
  fields: { vessel: 'burette', value_mL: 'reading' },
  handlesLiquid: false,
  delivers: false,
  offered: (spec) => spec.vessels.some((v) => v.glass === 'burette-50'),
  check: (at, m) => {
    const found = on(at, m.vessel, false);
    if (!found.ok) return found.refusal;
    const { glass, spec } = found.found;
    if (glass.family !== 'burette')
      return refuse('wrong-vessel', `${spec.label} is no burette; its level is read at its marks.`);
    if (
      typeof m.value_mL !== 'number' ||
      !Number.isFinite(m.value_mL) ||
      m.value_mL < -2 ||
      m.value_mL > glass.nominal_mL
    ) {
      return refuse('bad-value', `A reading of this burette lies between 0 and ${glass.nominal_mL} mL.`);
    }
    return Math.abs(m.value_mL * 20 - Math.round(m.value_mL * 20)) > 1e-6
      ? refuse('bad-value', 'Read a burette to 0.05 mL: the second decimal is 0 or 5.')
      : null;
  },
  perform: (at, m) => ({ scene: withVessel(at.scene, m.vessel, { entered: m.value_mL }), notices: [] }),
  tell: (at, m) => `${nameOf(at, m.vessel)} read: ${m.value_mL.toFixed(2)} mL`,
});

/** Cautions that a lesson owes its readers, by what stands on its benches. */
import type { BenchSpec, Contents } from '../../bench/index.ts';
import type { CompiledLesson } from '../types.ts';
import { roleOf } from '../questions/wrongMethods.ts';

/** From here on eye protection comes before the first move (usual school practice, from memory; local rules decide). */
const GOGGLES_molL = 0.4;

interface Lack {
  readonly bench: string;
  readonly sentence: string;
  readonly fix: string;
}

const partsOf = (spec: BenchSpec): { label: string; substance: string; molL: number }[] =>
  [...spec.vessels, ...spec.shelf].flatMap((thing) =>
    ((thing.contents as Contents | undefined)?.parts ?? []).map(({ substance, concentration_molL }) => ({
      label: thing.label,
      substance,
      molL: typeof concentration_molL === 'number' ? concentration_molL : concentration_molL.to,
    })),
  );

export function lacksOf(lesson: CompiledLesson): Lack[] {
  const cautions = lesson.blocks
    .flatMap((block) => (block.kind === 'prose' ? [block.html] : []))
    .flatMap((html) => html.match(/<aside class="caution">.*?<\/aside>/gs) ?? []);
  const deferring = cautions.some((text) => /local rules/.test(text) && /licensed practice/.test(text));
  return lesson.blocks.flatMap((block): Lack[] => {
    if (block.kind !== 'bench') return [];
    const strong = partsOf(block.spec).filter(({ substance }) => {
      const { role } = roleOf(substance);
      return role === 'strong-acid' || role === 'strong-base';
    });
    const lacks: Lack[] = [];
    if (strong.length > 0 && !deferring)
      lacks.push({
        bench: block.spec.id,
        sentence: `${strong[0]!.label} stands on this bench, and no caution refers to local rules and licensed practice.`,
        fix: ':::caution\nWear eye protection. … Follow your local rules and your school’s licensed practice.\n:::',
      });
    const harsh = strong.find(({ molL }) => molL >= GOGGLES_molL);
    if (harsh && block.spec.safety?.goggles !== 'first')
      lacks.push({
        bench: block.spec.id,
        sentence: `${harsh.label} at ${harsh.molL} mol/L needs goggles before the first move.`,
        fix: 'safety: { goggles: first }',
      });
    return lacks;
  });
}

import { createState, type BenchSpec } from '../bench/index.ts';
import { families } from '../chemistry/families.ts';
import { indicatorData } from '../chemistry/indicatorData.ts';
import { findSubstance, substances } from '../chemistry/substances.ts';
import { nearest } from './nearest.ts';
import type { Told } from './yamlFaults.ts';

/** What the schema cannot see: names that point to nothing, glasses too small, bounds the wrong way round. */
export function benchProblems(spec: BenchSpec): Told[] {
  const problems: Told[] = [];
  const vessels = spec.vessels.map(({ id }) => id);
  const things = [...vessels, ...spec.shelf.map(({ id }) => id)];
  const unknown = (path: Told['path'], word: string, what: string, list: readonly string[]) => {
    const close = nearest(word, list);
    const key = String([...path].reverse().find((step) => typeof step === 'string'));
    problems.push({ path, message: what, found: word, ...(close ? { fix: `${key}: ${close}` } : {}) });
  };
  for (const [n, id] of things.entries())
    if (things.indexOf(id) < n)
      problems.push({
        path: n < vessels.length ? ['vessels', n, 'id'] : ['shelf', n - vessels.length, 'id'],
        message: `Two things on this bench have the id '${id}'.`,
        found: `id: ${id}`,
      });

  for (const [list, entries] of [
    ['vessels', spec.vessels],
    ['shelf', spec.shelf],
  ] as const)
    for (const [n, entry] of entries.entries()) {
      for (const [m, { substance }] of (entry.contents?.parts ?? []).entries())
        if (!findSubstance(substance))
          unknown(
            [list, n, 'contents', 'parts', m, 'substance'],
            substance,
            `There is no substance '${substance}'.`,
            substances.flatMap((one) => [one.formula, ...one.names]),
          );
      for (const [m, { indicator }] of (entry.contents?.indicators ?? []).entries())
        if (!Object.hasOwn(indicatorData, indicator))
          unknown(
            [list, n, 'contents', 'indicators', m, 'indicator'],
            indicator,
            `There is no indicator '${indicator}'.`,
            Object.keys(indicatorData),
          );
      const dye = 'indicator' in entry ? entry.indicator?.id : undefined;
      if (dye !== undefined && !Object.hasOwn(indicatorData, dye))
        unknown(
          [list, n, 'indicator', 'id'],
          dye,
          `There is no indicator '${dye}'.`,
          Object.keys(indicatorData),
        );
    }

  for (const [n, sample] of (spec.samples ?? []).entries()) {
    for (const id of sample.into)
      if (!things.includes(id))
        unknown(
          ['samples', n, 'into'],
          id,
          `The sample '${sample.id}' goes into '${id}', which this bench does not have.`,
          things,
        );
    for (const [m, { parts }] of sample.contents.entries())
      for (const { substance } of parts ?? [])
        if (!findSubstance(substance))
          unknown(
            ['samples', n, 'contents', m],
            substance,
            `There is no substance '${substance}'.`,
            substances.flatMap((one) => [one.formula, ...one.names]),
          );
  }

  for (const [n, aim] of spec.aims.entries()) {
    const at = (key: string): Told['path'] => ['aims', n, key];
    const named = [
      ...('vessel' in aim && aim.vessel ? [[aim.vessel, 'vessel'] as const] : []),
      ...('vessels' in aim ? aim.vessels.map((one) => [one, 'vessels'] as const) : []),
    ];
    for (const [vessel, key] of named)
      if (!vessels.includes(vessel))
        unknown(
          at(key),
          vessel,
          `The aim '${aim.id}' names the vessel '${vessel}', which this bench does not have.`,
          vessels,
        );
    for (const of of ['of' in aim ? aim.of : undefined, ...(aim.limits ?? []).map((limit) => limit.of)])
      if (of !== undefined && !things.includes(of))
        unknown(at('of'), of, `The aim '${aim.id}' names '${of}', which this bench does not have.`, things);
    const others = spec.aims.map(({ id }) => id).filter((id) => id !== aim.id);
    for (const [key, ids] of [
      ['after', aim.after ?? []],
      ['with', 'with' in aim ? aim.with : []],
    ] as const)
      for (const id of ids)
        if (!others.includes(id))
          unknown(
            at(key),
            id,
            `The aim '${aim.id}' waits for the aim '${id}', which this bench does not have.`,
            others,
          );
    if ('family' in aim && !Object.hasOwn(families, aim.family))
      unknown(at('family'), aim.family, `There is no acid family '${aim.family}'.`, Object.keys(families));
    if ('min' in aim && 'max' in aim && aim.min !== undefined && aim.max !== undefined && aim.min > aim.max)
      problems.push({
        path: at('min'),
        message: `The aim '${aim.id}' has its bounds the wrong way round.`,
        found: `min: ${aim.min}`,
        fix: `min: ${aim.max}`,
      });
  }
  if (problems.length > 0) return problems;
  try {
    createState(spec, { seed: 1 });
  } catch (error) {
    problems.push({ path: [], message: (error as Error).message });
  }
  return problems;
}

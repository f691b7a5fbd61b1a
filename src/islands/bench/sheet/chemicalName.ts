const SUB = '₀₁₂₃₄₅₆₇₈₉';
const SUP = '⁰¹²³⁴⁵⁶⁷⁸⁹';

/** 'CH3COO-' as it is written: 'CH₃COO⁻'; 'SO4-2' as 'SO₄²⁻'. For places that take text alone, such as figures. */
export function chemicalName(formula: string): string {
  const charge = /([+-])(\d*)$/.exec(formula);
  const body = charge ? formula.slice(0, charge.index) : formula;
  const low = body.replace(/(?<=[A-Za-z)])\d+/g, (digits) =>
    [...digits].map((digit) => SUB[Number(digit)]).join(''),
  );
  if (!charge) return low;
  const count = [...charge[2]!].map((digit) => SUP[Number(digit)]).join('');
  return `${low}${count}${charge[1] === '+' ? '⁺' : '⁻'}`;
}

/** A sentence with the named species written as they should be. Longer names first, so that none is cut short. */
export function withChemicalNames(sentence: string, formulas: readonly string[]): string {
  const longest = [...new Set(formulas)].sort((a, b) => b.length - a.length);
  const pattern = longest.map((formula) => formula.replace(/[.*+?^${}()|[\]\\]/g, '\\$&')).join('|');
  return pattern === '' ? sentence : sentence.replace(new RegExp(pattern, 'g'), chemicalName);
}

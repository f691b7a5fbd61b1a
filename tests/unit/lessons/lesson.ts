/** A small sound lesson, and ways to change it. */
export const SOUND = `---
title: Two beakers
number: 90
summary: Acid into water and into a buffer.
model: textbook
minutes: 20
---

Pure water has a pH of \`= pH(1 L of water)\`.

\`\`\`prediction
id: guess
bench: pour
ask: Which one turns yellow first?
options:
  - { id: w, text: The water, first: water }
  - { id: b, text: The buffer, first: buffer }
observe: Which one turned yellow first?
outcome: { drip: acid, into: [water, buffer], until: [yellow] }
\`\`\`

\`\`\`bench
id: pour
title: Pour
vessels:
  - id: water
    label: Water
    glass: beaker-100
    stirrer: "on"
    contents: { volume_mL: 50, water: boiled, indicators: [{ indicator: bromocresol-green, volume_mL: 0.5 }] }
  - id: buffer
    label: Buffer
    glass: beaker-100
    stirrer: "on"
    contents:
      volume_mL: 50
      parts:
        - { substance: CH3COOH, concentration_molL: 0.005 }
        - { substance: CH3COONa, concentration_molL: 0.005 }
      indicators: [{ indicator: bromocresol-green, volume_mL: 0.5 }]
shelf:
  - id: acid
    label: Hydrochloric acid
    kind: reagent
    contents: { volume_mL: 100, parts: [{ substance: HCl, concentration_molL: 0.1 }] }
aims:
  - { id: yellow, text: Turn the buffer yellow, kind: colour, vessel: buffer, words: [yellow] }
\`\`\`

## Questions

\`\`\`question
id: dilute
kind: numeric
ask: What is the pH of hydrochloric acid, \`= c in mol/L to 2 figures\`?
vary: { c: [0.0010, 0.0020, 0.0050, 0.010, 0.020, 0.050] }
mixture: 100 mL of c mol/L HCl
wrong: [sign-lost, pOH-for-pH, natural-logarithm, concentration-for-pH]
pour: { indicator: thymol-blue }
solution: The acid is strong, so $[\\ce{H3O+}]$ is \`= c in mol/L to 2 figures\`, and the pH is \`= pH(mixture)\`.
\`\`\`

\`\`\`question
id: which
kind: choice
ask: Which one is a buffer?
options:
  - { id: both, text: Ethanoic acid with ethanoate, right: true, feedback: Both partners are there. }
  - { id: salt, text: HCl with NaCl, misconception: M13, feedback: Chloride takes no hydrogen ion in. }
\`\`\`
`;

/** The sound lesson with one piece of text put in place of another that stands in it. */
export function changed(from: string, to: string, text = SOUND): string {
  if (!text.includes(from)) throw new Error(`The sound lesson has no “${from}”.`);
  return text.replace(from, () => to);
}

export const block = (kind: string, yaml: string): string => `${SOUND}\n\`\`\`${kind}\n${yaml}\n\`\`\`\n`;

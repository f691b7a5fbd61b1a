/** A lesson that Harrowmere's own author wrote, in the three revisions that it went through. */
const text = (summary: string, aim: string, more: string) => `---
title: The sluice sample
number: 21
summary: ${summary}
lang: en-GB
model: textbook
access: members
minutes: 10
---

On the way to Kestrel Point our bus crosses a sluice. We filled two bottles there: one from the marsh side, one from the
river side. Back in the laboratory only one of them had kept its pH.

## Try it with a model of the marsh water

:::caution
Hydrochloric acid at 0.10 mol/L is dilute, but it still hurts eyes. In a real laboratory wear eye protection, and rinse at
once with plenty of water if anything gets into an eye. Follow your local rules and your school's licensed practice.
:::

\`\`\`bench
id: sluice
title: The sluice sample
temperature_C: 25
vessels:
  - id: marsh
    label: Model of marsh water
    glass: beaker-100
    probe: true
    stirrer: "on"
    contents:
      volume_mL: 50
      water: boiled
      parts:
        - { substance: CH3COOH, concentration_molL: 0.002 }
        - { substance: CH3COONa, concentration_molL: 0.004 }
      indicators:
        - { indicator: bromocresol-green, volume_mL: 0.5 }
shelf:
  - id: acid
    label: Hydrochloric acid
    kind: reagent
    contents: { volume_mL: 100, parts: [{ substance: HCl, concentration_molL: 0.1 }] }
aims:
  - ${aim}
\`\`\`

${more}
`;

const LOWER = '{ id: lower, text: Bring it below pH 4.50, kind: pH, vessel: marsh, max: 4.5 }';
const QUESTION = `\`\`\`question
id: partner
kind: choice
ask: Which particles took the acid in?
options:
  - { id: ethanoate, text: The ethanoate ions, right: true, feedback: They become ethanoic acid. }
  - { id: sodium, text: The sodium ions, misconception: M13, feedback: Sodium ions take no hydrogen ion in. }
\`\`\``;

export const SCHOOL_LESSON = {
  file: 'the-sluice-sample.md',
  revisions: [
    text('Water from the marsh.', LOWER, 'Count the drops.'),
    text('Why one of two bottles kept its pH.', LOWER, 'Count the drops, and look at the pair bar.'),
    text(
      'Why one of two bottles kept its pH.',
      LOWER,
      `Count the drops, and look at the pair bar.\n\n${QUESTION}`,
    ),
  ],
} as const;

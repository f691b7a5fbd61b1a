/** Where each acid constant of families.ts comes from, step by step. Not part of the bench's bundle. */

export const SOURCES = {
  goldberg:
    'Goldberg R.N., Kishore N., Lennen R.M., Thermodynamic quantities for the ionization reactions of buffers, J. Phys. Chem. Ref. Data 31 (2002) 231, section 8',
  goldbergMemory: 'Goldberg, Kishore and Lennen 2002 (as above), from memory: not read again in the source',
  memory: 'general handbook knowledge, from memory',
} as const;

export type SourceId = keyof typeof SOURCES;

/** One word for each step, in the order of families.ts. */
export const familySources: Readonly<Record<string, readonly SourceId[]>> = {
  phosphoric: ['goldbergMemory', 'goldberg', 'goldbergMemory'],
  ethanoic: ['goldberg'],
  citric: ['goldberg', 'goldberg', 'goldberg'],
  carbonic: ['goldbergMemory', 'goldberg'],
  ammonium: ['goldberg'],
  boric: ['goldberg'],
  tris: ['goldberg'],
  phthalic: ['goldbergMemory', 'goldbergMemory'],
  methanoic: ['memory'],
  lactic: ['memory'],
  glycine: ['goldbergMemory', 'goldberg'],
  hepes: ['goldbergMemory', 'goldberg'],
  mes: ['goldberg'],
  sulfuric: ['goldbergMemory'],
  oxalic: ['goldbergMemory', 'goldbergMemory'],
  tartaric: ['goldbergMemory', 'goldbergMemory'],
  hypochlorous: ['memory'],
  succinic: ['goldberg', 'goldberg'],
  imidazole: ['goldberg'],
  bicine: ['goldberg'],
  tricine: ['goldberg'],
  ches: ['goldberg'],
  caps: ['goldberg'],
  benzoic: ['memory'],
  propanoic: ['memory'],
  malic: ['memory', 'memory'],
  ascorbic: ['memory', 'memory'],
  edta: ['memory', 'memory', 'memory', 'memory'],
  pyrophosphoric: ['memory', 'memory', 'memory', 'memory'],
};

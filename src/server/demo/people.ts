/**
 * The people of the demo: invented, like Kestrel Point field station and Harrowmere College. Nobody here exists.
 */
import type { Role } from '../database/index.ts';

export interface DemoPerson {
  readonly key: string;
  readonly name: string;
  readonly roles: readonly {
    readonly role: Role;
    readonly school: boolean;
    readonly source: 'purchase' | 'seat' | 'staff';
    /** Days before today; absent: still counts. */
    readonly from: number;
    readonly to?: number;
  }[];
  /** Printed by `npm start`: what one can do as this person. */
  readonly shown?: string;
  readonly groups?: readonly { readonly name: string; readonly role: 'learner' | 'teacher' }[];
  /** How they work through the course, and how far they have come (of 1). */
  readonly works?: { readonly habit: Habit; readonly through: number };
}

/** How a person works at a bench. */
export type Habit = 'steady' | 'bold' | 'undoing' | 'stopping';

export const SCHOOL = { key: 'harrowmere', name: 'Harrowmere College', code: 'HARROW' } as const;
export const GROUPS = ['12 Chemistry A', '12 Chemistry B', '13 Chemistry'] as const;

const staff = (role: Role, school: boolean) => ({ role, school, source: 'staff', from: 700 }) as const;
const seat = (from: number, to?: number) =>
  ({ role: 'learner', school: true, source: 'seat', from, ...(to === undefined ? {} : { to }) }) as const;

const NAMED: readonly DemoPerson[] = [
  {
    key: 'noor',
    name: 'Noor van Beek',
    roles: [{ role: 'learner', school: false, source: 'purchase', from: 40, to: -325 }],
    shown: 'independent learner, in the middle of the course',
    works: { habit: 'steady', through: 0.6 },
  },
  {
    key: 'ikaika',
    name: 'Ikaika Palakiko',
    roles: [seat(70)],
    shown: 'learner with a seat of Harrowmere College',
    groups: [{ name: GROUPS[0], role: 'learner' }],
    works: { habit: 'undoing', through: 0.8 },
  },
  {
    key: 'wren',
    name: 'Wren Achterberg',
    roles: [staff('teacher', true)],
    shown: 'teacher at Harrowmere College',
    groups: [
      { name: GROUPS[0], role: 'teacher' },
      { name: GROUPS[2], role: 'teacher' },
    ],
  },
  {
    key: 'tomasz',
    name: 'Tomasz Grzelak',
    roles: [staff('teacher', true)],
    groups: [{ name: GROUPS[1], role: 'teacher' }],
  },
  {
    key: 'philippa',
    name: 'Philippa Oduya',
    roles: [staff('admin', true)],
    shown: 'admin of Harrowmere College',
  },
  {
    key: 'saoirse',
    name: 'Saoirse Quell',
    roles: [staff('author', true), staff('teacher', true)],
    shown: 'author for Harrowmere College',
  },
  {
    key: 'edvin',
    name: 'Edvin Marsh-Lund',
    roles: [staff('author', false)],
    shown: 'author for Dropwise',
  },
  {
    key: 'constance',
    name: 'Constance Ferreyra',
    roles: [staff('operator', false)],
    shown: 'operator of Dropwise',
  },
  // Bought, then sent back within the fortnight: the work stays, the access ended.
  {
    key: 'bram',
    name: 'Bram Osei-Tutu',
    roles: [{ role: 'learner', school: false, source: 'purchase', from: 120, to: 111 }],
    works: { habit: 'stopping', through: 0.15 },
  },
  // A seat taken back when she left: her work stays hers.
  {
    key: 'ottoline',
    name: 'Ottoline Brandt',
    roles: [seat(400, 150)],
    works: { habit: 'steady', through: 0.7 },
  },
];

/** Learners of each group, from several languages. */
const CLASSES: readonly (readonly [(typeof GROUPS)[number], readonly string[]])[] = [
  [
    GROUPS[0],
    [
      'Amadou Diarra',
      'Beatrix Holloway',
      'Chidera Nwosu',
      'Dagny Solheim',
      'Emre Yıldırım',
      'Fenna Dijkhuis',
      'Giang Lê Thu',
      'Hamza Boukhari',
      'Ilse Kranenburg',
      'Jovana Petrić',
      'Kwabena Asante',
      'Léonie Vautrin',
      'Mateus Figueira',
      'Nanami Okabe',
      'Oisín Mac Giolla',
      'Parvati Rangan',
      'Quirin Haslach',
      'Rosalind Peake',
      'Sung-min Cha',
      'Talia Ben-Ezra',
      'Ulrike Stadler',
      'Vasco Meireles',
    ],
  ],
  [
    GROUPS[1],
    [
      'Aurelio Conti',
      'Bogdan Ilieșcu',
      'Citlali Ramos',
      'Dilnoza Karimova',
      'Eilidh Macrae',
      'Farah Siddiqi',
      'Gwenllian Pryce',
      'Henrik Aaltonen',
      'Ingrid Þórsdóttir',
      'Jasper Thorne',
      'Keziah Mbeki-Lowe',
      'Lorcan Devane',
      'Mbali Dlamini',
      'Nils Öberg',
      'Oluwaseun Ade',
      'Priya Kulkarni',
      'Rafael Quiroga',
      'Siobhan Lacey',
    ],
  ],
  [
    GROUPS[2],
    [
      'Anouk Marchetti',
      'Callum Rudge',
      'Esperanza Vidal',
      'Goran Kovačić',
      'Hinemoa Tane',
      'Isolde Wertheim',
      'Lucian Bărbulescu',
      'Mirembe Nakato',
      'Stellan Ek',
      'Yuki Hanada',
    ],
  ],
];

const HABITS: readonly Habit[] = ['steady', 'bold', 'undoing', 'stopping'];

/** Groups stand at different points of the course: those of the older one are nearly through. */
const THROUGH: Readonly<Record<(typeof GROUPS)[number], number>> = {
  '12 Chemistry A': 0.55,
  '12 Chemistry B': 0.3,
  '13 Chemistry': 0.9,
};

const keyOf = (name: string): string =>
  name
    .normalize('NFD')
    .replace(/[^A-Za-z ]/g, '')
    .trim()
    .toLowerCase()
    .replace(/ +/g, '.');

/** Everybody. The first ones are those whose sign-ins are printed. */
export const PEOPLE: readonly DemoPerson[] = [
  ...NAMED,
  ...CLASSES.flatMap(([group, names]) =>
    names.map((name, i): DemoPerson => {
      const spread = ((i * 37) % 10) / 25 - 0.2;
      return {
        key: keyOf(name),
        name,
        roles: [seat(group === '13 Chemistry' ? 430 : 75)],
        groups: [{ name: group, role: 'learner' }],
        works: { habit: HABITS[i % HABITS.length]!, through: Math.min(1, THROUGH[group] + spread) },
      };
    }),
  ),
];

export const emailOf = (person: DemoPerson): string => `${person.key}@kestrel-point.example`;

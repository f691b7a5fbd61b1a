import { people } from './people.ts';

export const server = { people };

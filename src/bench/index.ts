/** The bench: what a pair of hands does with acid, base and buffer. Pure; imports chemistry alone. */
export * from './types.ts';
export * from './glassware.ts';

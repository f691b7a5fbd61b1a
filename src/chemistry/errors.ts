/** Bad input to the chemistry: names the field and, where there is one, the nearest valid word. */
export class ChemistryError extends Error {
  constructor(
    readonly field: string,
    message: string,
    readonly nearest?: string,
  ) {
    super(message);
    this.name = 'ChemistryError';
  }
}

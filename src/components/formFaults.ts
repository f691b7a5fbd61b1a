import { isInputError, type ActionError } from 'astro:actions';

/** The faults of a form by field; what belongs to no field stands under `form`. */
export function faultsOf(error: ActionError | undefined): Record<string, string> {
  if (!error) return {};
  if (isInputError(error)) {
    const faults: Record<string, string> = {};
    for (const [field, messages] of Object.entries(error.fields as Record<string, string[]>))
      if (messages?.[0]) faults[field] = messages[0];
    return faults;
  }
  try {
    return JSON.parse(error.message) as Record<string, string>;
  } catch {
    return { form: 'Something went wrong on our side. Try again in a moment.' };
  }
}

import type { Answer, QuestionForLearner } from '../../lessons/questions/types';

type Of<K extends Answer['kind']> = Extract<Answer, { kind: K }>;
export type SpecOf<K extends Answer['kind']> = Extract<QuestionForLearner, { kind: K }>;

/**
 * A draft as this question can take it. What was kept may be from another revision: ids that are gone fall away, and what
 * somebody wrote stays.
 */
export function draftFor(spec: QuestionForLearner, kept: Answer | null): Answer {
  switch (spec.kind) {
    case 'choice': {
      const ids = new Set(spec.options.map(({ id }) => id));
      const chosen = kept?.kind === 'choice' ? kept.chosen.filter((id) => ids.has(id)) : [];
      return { kind: 'choice', chosen: spec.several ? chosen : chosen.slice(0, 1) };
    }
    case 'numeric':
      return { kind: 'numeric', typed: kept?.kind === 'numeric' ? kept.typed : '' };
    case 'order': {
      const usual = spec.items.map(({ id }) => id);
      const order = kept?.kind === 'order' ? kept.order : usual;
      const whole = order.length === usual.length && usual.every((id) => order.includes(id));
      return { kind: 'order', order: whole ? order : usual };
    }
    case 'match': {
      const rights = new Set(spec.rights.map(({ id }) => id));
      const matched = kept?.kind === 'match' ? kept.matched : {};
      return {
        kind: 'match',
        matched: Object.fromEntries(
          spec.lefts.flatMap(({ id }) => (rights.has(matched[id] ?? '') ? [[id, matched[id]!]] : [])),
        ),
      };
    }
    case 'explain':
      return kept?.kind === 'explain' ? kept : { kind: 'explain', text: '' };
  }
}

/** An item moved to another place; places outside the list are its ends. */
export function moved(order: readonly string[], id: string, to: number): readonly string[] {
  const rest = order.filter((one) => one !== id);
  const place = Math.max(0, Math.min(rest.length, to));
  return [...rest.slice(0, place), id, ...rest.slice(place)];
}

/** Which parts of a marked answer still stand where they were found out of place. */
export function stillMisplaced(
  draft: Of<'order'> | Of<'match'>,
  marked: Answer | undefined,
  misplaced: readonly string[],
): ReadonlySet<string> {
  return new Set(
    misplaced.filter((id) => {
      if (draft.kind === 'order' && marked?.kind === 'order')
        return draft.order.indexOf(id) === marked.order.indexOf(id);
      if (draft.kind === 'match' && marked?.kind === 'match') return draft.matched[id] === marked.matched[id];
      return false;
    }),
  );
}

/** What a form of the page holds that was filled in before its script had come; null where nothing was. */
export function typedBefore(spec: QuestionForLearner): Answer | null {
  // The server renders islands, too, and has no document.
  if (typeof document === 'undefined') return null;
  const form = document.querySelector<HTMLFormElement>(`#${CSS.escape(spec.id)} form`);
  if (!form) return null;
  const fields = new FormData(form);
  const answers = fields.getAll('answer').map(String).filter(Boolean);
  if (spec.kind === 'match') {
    const matched = spec.lefts.flatMap(({ id }) => {
      const right = fields.get(`answer-${id}`);
      return right ? [[id, String(right)] as const] : [];
    });
    return matched.length > 0 ? { kind: 'match', matched: Object.fromEntries(matched) } : null;
  }
  if (answers.length === 0) return null;
  switch (spec.kind) {
    case 'choice':
      return { kind: 'choice', chosen: answers };
    case 'numeric':
      return { kind: 'numeric', typed: answers[0]! };
    case 'explain':
      return { kind: 'explain', text: answers[0]! };
    default:
      return null;
  }
}

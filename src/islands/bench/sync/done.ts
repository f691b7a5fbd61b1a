/** Tells the page around the islands which checkpoints are done; the margin's burette listens. */
export function tellDone(ids: readonly string[]): void {
  if (typeof window === 'undefined' || ids.length === 0) return;
  window.dispatchEvent(new CustomEvent('dropwise:done', { detail: ids }));
}

/**
 * What is wider than its column is scrolled inside it: then keys must reach it, too, and a screen reader needs a name for
 * it. Where everything fits, it is no stop for the Tab key.
 * @param name what a screen reader calls it
 */
export function reachByKeys(selector: string, name: string): void {
  const watcher = new ResizeObserver((entries) => {
    for (const { target } of entries) {
      const wide = target.scrollWidth > target.clientWidth;
      for (const [attribute, value] of Object.entries({ tabindex: '0', role: 'group', 'aria-label': name }))
        if (wide) target.setAttribute(attribute, value);
        else target.removeAttribute(attribute);
    }
  });
  for (const target of document.querySelectorAll(selector)) watcher.observe(target);
}

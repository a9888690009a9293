/** Calls back when the page's theme changes: by the system, or by `data-theme` on the root. Returns the end of it. */
export function onThemeChange(document: Document, changed: () => void): () => void {
  const system = document.defaultView?.matchMedia('(prefers-color-scheme: dark)');
  const observer = new MutationObserver(changed);
  system?.addEventListener('change', changed);
  observer.observe(document.documentElement, { attributeFilter: ['data-theme'] });
  return () => {
    system?.removeEventListener('change', changed);
    observer.disconnect();
  };
}

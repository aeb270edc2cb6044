const KEY = 'eremite.reloaded';
const AGAIN_AFTER_MS = 30_000;

/** A page left open over an upgrade asks for parts that are gone: it is loaded anew, but never in a circle. */
export function reloadWhenReplaced(): void {
  window.addEventListener('vite:preloadError', (event) => {
    const last = Number(sessionStorage.getItem(KEY) ?? 0);
    if (Date.now() - last < AGAIN_AFTER_MS) return;
    sessionStorage.setItem(KEY, String(Date.now()));
    event.preventDefault();
    window.location.reload();
  });
}

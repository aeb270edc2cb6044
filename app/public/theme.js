// Before the first paint, so that a light page never flashes dark. A file of its own: the content policy forbids inline scripts.
try {
  const kept = JSON.parse(localStorage.getItem('eremite.preferences') ?? '{}').theme;
  if (kept === 'light' || kept === 'dark') document.documentElement.dataset.theme = kept;
} catch {
  // Storage may be closed to us; the dark theme stands.
}

// Runs before the first paint, so that a chosen theme does not flash past the system's. See src/lib/theme.ts.
(function () {
  var chosen = null;
  try {
    chosen = localStorage.getItem('ovenbird.theme');
  } catch {
    // Storage may be closed to us; then the system's theme it is.
  }
  var dark = chosen === 'dark' || (chosen !== 'light' && matchMedia('(prefers-color-scheme: dark)').matches);
  document.documentElement.dataset.theme = dark ? 'dark' : 'light';
  // The content security policy forbids code made from text: zod need not try.
  globalThis.__zod_globalConfig = { jitless: true };
})();

// Runs before the first paint, so that a chosen theme never flashes. The choice is kept by src/app/theme/theme-store.ts.
(function () {
  var chosen = null;
  try {
    chosen = localStorage.getItem('tollgate.theme');
  } catch (refused) {
    // Storage may be blocked: the system's theme holds then.
    chosen = null;
  }
  if (chosen === 'light' || chosen === 'dark') document.documentElement.dataset.theme = chosen;
})();

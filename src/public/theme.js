// Runs before the first paint; src/theme/theme.ts keeps the choice up to date afterwards.
(function () {
  var choice = null;
  try {
    choice = localStorage.getItem('massieu.theme');
  } catch (fault) {
    // Storage may be closed to the page; then the system's theme holds.
  }
  var dark =
    choice === 'dark' || (choice !== 'light' && matchMedia('(prefers-color-scheme: dark)').matches);
  document.documentElement.setAttribute('data-theme', dark ? 'dark' : 'light');
})();

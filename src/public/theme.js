// Runs before the first paint, so that no page flashes in the other theme.
(function () {
  var root = document.documentElement;
  var dark = window.matchMedia('(prefers-color-scheme: dark)');
  function choice() {
    try {
      return localStorage.getItem('brimline-theme') || 'auto';
    } catch {
      return 'auto';
    }
  }
  function apply() {
    var chosen = choice();
    var night = chosen === 'night' || (chosen === 'auto' && dark.matches);
    root.setAttribute('data-theme', night ? 'night' : 'day');
  }
  apply();
  dark.addEventListener('change', apply);
  window.addEventListener('storage', apply);
  window.addEventListener('brimline-theme', apply);
})();

/* global window, document */
// Runs before the first paint so that no page flashes in the wrong theme.
(function () {
  var choice = null;
  try {
    choice = window.localStorage.getItem('tremolode.theme');
  } catch {
    // Storage may be forbidden: then the system decides.
  }
  var dark = choice === 'dark' || (choice !== 'light' && window.matchMedia('(prefers-color-scheme: dark)').matches);
  document.documentElement.setAttribute('data-theme', dark ? 'dark' : 'light');
  var colour = document.querySelector('meta[name="theme-color"]');
  if (colour) colour.setAttribute('content', dark ? '#14171a' : '#f7f4ee');
})();

// Before the first paint, so that the chosen theme does not flash. A file of its own because inline scripts are not allowed.
(function () {
  try {
    var theme = localStorage.getItem('ebbline.theme');
    if (theme === 'light' || theme === 'dark') document.documentElement.dataset.theme = theme;
  } catch (_) {
    // Storage may be closed to us; the system's preference then decides.
  }
})();

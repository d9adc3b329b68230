/* Runs before the app and without it. Two jobs: the ground before the first paint, and a way out when the app does not start. */
(function () {
  'use strict';
  var ground = null;
  try {
    ground = localStorage.getItem('steepfall.ground');
  } catch (error) {
    ground = null;
  }
  if (ground !== 'night' && ground !== 'day') {
    ground = matchMedia('(prefers-color-scheme: dark)').matches ? 'night' : 'day';
  }
  document.documentElement.dataset.ground = ground;

  function repair() {
    var jobs = [];
    if ('serviceWorker' in navigator) {
      jobs.push(
        navigator.serviceWorker.getRegistrations().then(function (registrations) {
          return Promise.all(
            registrations.map(function (registration) {
              return registration.unregister();
            }),
          );
        }),
      );
    }
    if ('caches' in window) {
      jobs.push(
        caches.keys().then(function (names) {
          return Promise.all(
            names.map(function (name) {
              return caches.delete(name);
            }),
          );
        }),
      );
    }
    Promise.all(jobs).then(
      function () {
        location.reload();
      },
      function () {
        location.reload();
      },
    );
  }

  addEventListener('DOMContentLoaded', function () {
    setTimeout(function () {
      var root = document.getElementById('root');
      var panel = document.getElementById('boot-repair');
      if (!root || !panel || root.childElementCount > 0) return;
      panel.hidden = false;
      document.getElementById('boot-reload').addEventListener('click', function () {
        location.reload();
      });
      document.getElementById('boot-repair-now').addEventListener('click', repair);
    }, 8000);
  });
})();

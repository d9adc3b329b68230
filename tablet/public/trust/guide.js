/* Of the page about trusting the hub. Opens the steps of this kind of device, and asks the hub by HTTPS: who trusts it gets an answer. */
(function () {
  'use strict';
  var state = document.querySelector('.state');
  var heading = document.getElementById('state');
  var words = document.querySelector('.state-words');
  var open = document.getElementById('open');
  var again = document.getElementById('again');
  var hasAsked = false;

  function kindOfDevice() {
    var agent = navigator.userAgent;
    if (/iPad|iPhone/.test(agent)) return 'ipad';
    // An iPad calls itself a Mac, and is the only one that is touched.
    if (/Macintosh/.test(agent)) return navigator.maxTouchPoints > 1 ? 'ipad' : 'mac';
    if (/Android/.test(agent)) return 'android';
    if (/Windows/.test(agent)) return 'windows';
    return 'linux';
  }

  function show(kind, title, sentence) {
    state.dataset.state = kind;
    heading.textContent = title;
    words.textContent = sentence;
    open.hidden = kind !== 'trusted';
    again.hidden = kind === 'trusted' || kind === 'asking';
  }

  function ask() {
    show('asking', 'Looking …', 'Asking the hub by HTTPS.');
    // Its content is of no interest: without trust there is none at all.
    fetch(document.body.dataset.check, { mode: 'no-cors', cache: 'no-store' }).then(
      function () {
        show('trusted', 'This device trusts the hub.', 'Open Steepfall, and put it on the home screen from there.');
      },
      function () {
        show(
          'not-trusted',
          'Not trusted yet.',
          hasAsked
            ? 'Go through the steps once more. A browser that was open all the time may have to be closed first.'
            : 'Follow the steps of your device, then look again.',
        );
        hasAsked = true;
      },
    );
  }

  document.getElementById(kindOfDevice()).open = true;
  again.addEventListener('click', ask);
  // Somebody comes back from the settings.
  document.addEventListener('visibilitychange', function () {
    if (!document.hidden && state.dataset.state !== 'trusted') ask();
  });
  ask();
})();

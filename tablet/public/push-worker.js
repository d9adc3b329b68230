/* global self */
/* Part of the service worker: shows what the hub pushes to a phone that follows a run, and opens the page on a tap. */
(function () {
  'use strict';
  var buzz = { 'stand-by': [160, 120, 160], now: [300, 120, 300, 120, 600], missed: [300, 120, 300, 120, 600] };
  /* The push service drops it after a minute; a phone that was off for longer than that must not take it for news. */
  var NEWS_MS = 90000;

  function read(data) {
    try {
      return data.json();
    } catch (error) {
      return { title: 'Look at the run sheet' };
    }
  }

  self.addEventListener('push', function (event) {
    var message = read(event.data);
    var isOld = Date.now() - message.sentAtMs > NEWS_MS;
    var time = new Date(message.sentAtMs || Date.now()).toLocaleTimeString([], { hour: '2-digit', minute: '2-digit' });
    event.waitUntil(
      self.registration.showNotification(isOld ? 'At ' + time + ': ' + message.title : message.title, {
        body: message.body,
        tag: message.tag,
        renotify: Boolean(message.tag),
        requireInteraction: message.stage !== 'stand-by',
        vibrate: isOld ? [] : buzz[message.stage] || [],
        timestamp: message.sentAtMs,
        icon: '/icons/mark-192.png',
        badge: '/icons/mark-192.png',
      }),
    );
  });

  self.addEventListener('notificationclick', function (event) {
    event.notification.close();
    event.waitUntil(
      self.clients.matchAll({ type: 'window', includeUncontrolled: true }).then(function (windows) {
        var open = windows.find(function (one) {
          return new URL(one.url).pathname === '/follow';
        });
        return open ? open.focus() : self.clients.openWindow('/follow');
      }),
    );
  });
})();

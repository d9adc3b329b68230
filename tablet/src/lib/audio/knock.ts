/** Whether a page nobody looks at may show a notice of the device. */
export type NoticeState = 'allowed' | 'not-asked' | 'refused' | 'unsupported';

export function noticeState(): NoticeState {
  if (!window.isSecureContext || !('Notification' in window) || !('serviceWorker' in navigator)) return 'unsupported';
  const { permission } = Notification;
  return permission === 'granted' ? 'allowed' : permission === 'denied' ? 'refused' : 'not-asked';
}

/** To be called inside a tap. */
export async function allowNotices(): Promise<NoticeState> {
  if (noticeState() === 'not-asked') await Notification.requestPermission().catch(() => undefined);
  return noticeState();
}

/** The second channel of an alarm that nobody answers: a notice of the device itself, while the page is out of sight. */
export async function knock(tag: string, title: string, body: string): Promise<void> {
  if (document.visibilityState === 'visible' || noticeState() !== 'allowed') return;
  const registration = await navigator.serviceWorker.getRegistration();
  await registration?.showNotification(title, { tag, body, requireInteraction: true }).catch(() => undefined);
}

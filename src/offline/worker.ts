/**
 * Installs the worker that keeps the application's own files on the device, once the page is there and where the
 * browser allows it (a secure address or loopback). Without it everything works on line as before.
 */
export function installWorker(): void {
  if (!import.meta.env.PROD || !('serviceWorker' in navigator)) return
  const install = () => void navigator.serviceWorker.register('/sw.js').catch((reason: unknown) => console.warn('The application cannot be kept on this device.', reason))
  if (document.readyState === 'complete') install()
  else window.addEventListener('load', install, { once: true })
}

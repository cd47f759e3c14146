import './app.ts';

if (import.meta.env.PROD && 'serviceWorker' in navigator) {
  // Without it the editor works too, only not offline.
  navigator.serviceWorker.register('./service-worker.js').catch(() => {});
}

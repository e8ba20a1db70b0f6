/** For a demo: a mail server that keeps what it is sent, and what web and worker must know of it. */
export async function catchMail() {
  // Its packages are there once npm has installed them.
  const { startMailCatcher } = await import('./mail-catcher.mjs');
  const { smtpUrl, pagesUrl, stop } = await startMailCatcher();
  return { env: { PUTLOG_SMTP_URL: smtpUrl, PUTLOG_DEMO_MAIL: pagesUrl }, stop };
}

/** Runs once when a server process starts: the mail sender works beside the pages. */
export async function register(): Promise<void> {
  if (process.env.NEXT_RUNTIME !== 'nodejs') return;
  const { startMailSender } = await import('@/lib/mail/sender');
  startMailSender();
}

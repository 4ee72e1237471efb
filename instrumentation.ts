/** Runs once when a server starts: a server with an incomplete environment must not take a request. */
export async function register(): Promise<void> {
  if (process.env.NEXT_RUNTIME !== 'nodejs') return;
  const { getConfig } = await import('@/lib/config');
  getConfig();
}

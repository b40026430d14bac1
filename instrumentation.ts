import type { Instrumentation } from 'next';

/** Once at the start: the database brought up to date, the queue's unfinished work taken up. Requests wait until then. */
export async function register(): Promise<void> {
  if (process.env.NEXT_RUNTIME !== 'nodejs') return;
  const [{ takeAddressFromConnection }, { sessionSecret }, { boot }] = await Promise.all([
    import('./app/_server/peer-address'),
    import('./app/_server/auth'),
    import('./worker/boot'),
  ]);
  sessionSecret();
  takeAddressFromConnection();
  await boot();
}

/** A fault while a page was made: logged once, under the number that the page shows. */
export const onRequestError: Instrumentation.onRequestError = async (fault, request, context) => {
  if (process.env.NEXT_RUNTIME !== 'nodejs') return;
  const { log } = await import('./app/_server/log');
  const digest = fault instanceof Error && 'digest' in fault ? fault.digest : undefined;
  log.error({ err: fault, digest, method: request.method, route: context.routePath }, 'a page failed');
};

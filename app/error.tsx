'use client';
import { Button } from '@/components/ui/button';
import { Sheet, Zone } from '@/components/ui/sheet';

interface FaultProps {
  readonly error: Error & { readonly digest?: string };
  readonly reset: () => void;
}

/** A fault of the service while a page was read: what is safe, and what to do. */
export default function Fault({ error, reset }: FaultProps) {
  return (
    <main id="content">
      <Sheet wide={false}>
        <Zone title="This page could not be read" level={1}>
          <p>The server met a fault of its own. Your sheets and results are safe; runs go on.</p>
          {error.digest && (
            <p>
              Its number in the log is <code>{error.digest}</code>.
            </p>
          )}
          <p>
            <Button look="filled" onClick={reset}>
              Read the page again
            </Button>
          </p>
        </Zone>
      </Sheet>
    </main>
  );
}

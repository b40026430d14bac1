import Link from 'next/link';
import { Empty } from '@/components/ui/notice';
import { Sheet, Zone } from '@/components/ui/sheet';

export const metadata = { title: 'No such page' };

export default function NotFound() {
  return (
    <main id="content">
      <Sheet wide={false}>
        <Zone title="There is no such page" level={1}>
          <Empty>
            <p>Nothing stands at this address, or it isn’t yours to see. Check the address, or start from the beginning.</p>
            <p>
              <Link href="/">To the start</Link>
            </p>
          </Empty>
        </Zone>
      </Sheet>
    </main>
  );
}

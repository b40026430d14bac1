import 'server-only';
import { notFound } from 'next/navigation';
import { ApiError } from '@/lib/api/error';

/** What a page is about; where it isn't there for this person, there is no such page. */
export async function pageThing<T>(find: Promise<T>): Promise<T> {
  try {
    return await find;
  } catch (thrown) {
    if (thrown instanceof ApiError && thrown.code === 'not-found') notFound();
    throw thrown;
  }
}

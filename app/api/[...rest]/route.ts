import { door } from '@/app/_server/door';
import { notFound } from '@/lib/api/error';

/** Any other address under /api: nothing is there, said in the one shape of error. */
const nothing = door(() => Promise.reject(notFound('address in the API')));

export { nothing as DELETE, nothing as GET, nothing as PATCH, nothing as POST, nothing as PUT };

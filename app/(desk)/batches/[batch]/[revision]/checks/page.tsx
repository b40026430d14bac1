import type { Metadata } from 'next';
import { TablePage, type TablePageProps } from '../_table/table-page';

export const metadata: Metadata = { title: 'Checks' };

export default function ChecksPage(props: TablePageProps) {
  return <TablePage {...props} table="checks" />;
}

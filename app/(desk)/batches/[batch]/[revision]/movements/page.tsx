import type { Metadata } from 'next';
import { TablePage, type TablePageProps } from '../_table/table-page';

export const metadata: Metadata = { title: 'Movements' };

export default function MovementsPage(props: TablePageProps) {
  return <TablePage {...props} table="movements" />;
}

import type { Metadata } from 'next';
import { TablePage, type TablePageProps } from '../_table/table-page';

export const metadata: Metadata = { title: 'Reactions' };

export default function ReactionsPage(props: TablePageProps) {
  return <TablePage {...props} table="reactions" />;
}

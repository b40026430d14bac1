import type { Metadata } from 'next';
import { TablePage, type TablePageProps } from '../_table/table-page';

export const metadata: Metadata = { title: 'Members' };

export default function MembersPage(props: TablePageProps) {
  return <TablePage {...props} table="members" />;
}

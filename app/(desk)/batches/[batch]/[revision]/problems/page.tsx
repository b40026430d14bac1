import type { Metadata } from 'next';
import { TablePage, type TablePageProps } from '../_table/table-page';

export const metadata: Metadata = { title: 'Problems' };

export default function ProblemsPage(props: TablePageProps) {
  return <TablePage {...props} table="problems" />;
}

import type { Metadata } from 'next';
import { TablePage, type TablePageProps } from '../_table/table-page';

export const metadata: Metadata = { title: 'Frames' };

export default function FramesPage(props: TablePageProps) {
  return <TablePage {...props} table="frames" />;
}

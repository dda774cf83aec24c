import type { LayoutView } from '@app/contracts';
import { useSession } from '../../../shared/session/session';
import { Action } from '../../../shared/ui/action';
import { FoldingTable, type FoldingColumn } from '../../../shared/ui/folding-table';
import { Sheet } from '../../../shared/ui/sheet';
import { When } from '../../../shared/ui/when';
import { useForgetLayout, useLayouts } from '../api/use-layouts';

/** How workbooks of the line are read: the layouts that somebody confirmed. */
export function KnownLayouts({ lineId, lineName }: { lineId: number; lineName: string }) {
  const { can } = useSession();
  const { data: layouts = [] } = useLayouts(lineId);
  const forget = useForgetLayout(lineId);
  if (layouts.length === 0) return null;
  const columns: FoldingColumn<LayoutView>[] = [
    { name: 'Sheet', isLead: true, cell: ({ sheetName }) => sheetName },
    {
      name: 'How it is read',
      cell: ({ answers }) => (answers.length === 0 ? 'as recognised' : answers.join(' ')),
    },
    { name: 'Confirmed by', cell: ({ rememberedBy }) => rememberedBy },
    { name: 'On', cell: ({ rememberedAt }) => <When at={rememberedAt} form="short" /> },
  ];
  if (can('upload_intake'))
    columns.push({
      name: '',
      cell: ({ id, sheetName }) => (
        <Action
          kind="plain"
          label={`Forget the layout of the sheet ${sheetName}`}
          isDisabled={forget.isPending}
          onPress={() => forget.mutate(id)}
        >
          Forget
        </Action>
      ),
    });
  return (
    <Sheet
      title="Layouts that are known"
      isFlush
      margin={
        <p>A workbook with one of these headers is read without a question. One with another header is shown first.</p>
      }
    >
      <FoldingTable caption={`Layouts known of ${lineName}`} columns={columns} items={layouts} keyOf={({ id }) => id} />
    </Sheet>
  );
}

import { useMutation } from '@tanstack/react-query';
import type { LotFilters } from '../../../app/urls';
import { download } from '../../../shared/api/download';
import { useSession } from '../../../shared/session/session';
import { Action } from '../../../shared/ui/action';
import { useToast } from '../../../shared/ui/toast';
import { lotsPath } from '../filters';

/** The lots that fit the filters, all pages of them, as an Excel workbook. */
export function ExportLots({ filters, total }: { filters: LotFilters; total: number }) {
  const { plant } = useSession();
  const toast = useToast();
  const exporting = useMutation({
    mutationFn: () => download(lotsPath(filters, plant, 'xlsx'), 'lots.xlsx'),
    onError: toast.failed,
  });
  return (
    <Action kind="quiet" isDisabled={total === 0} isBusy={exporting.isPending} onPress={() => exporting.mutate()}>
      {exporting.isPending ? 'Writing the workbook…' : 'Export to Excel'}
    </Action>
  );
}

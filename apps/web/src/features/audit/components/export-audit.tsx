import { useMutation } from '@tanstack/react-query';
import { download } from '../../../shared/api/download';
import { Action } from '../../../shared/ui/action';
import { useToast } from '../../../shared/ui/toast';

/** The entries that fit the filters, all pages of them, as an Excel workbook. */
export function ExportAudit({ path, total }: { path: string; total: number }) {
  const toast = useToast();
  const exporting = useMutation({ mutationFn: () => download(path, 'audit.xlsx'), onError: toast.failed });
  return (
    <Action kind="quiet" isDisabled={total === 0} isBusy={exporting.isPending} onPress={() => exporting.mutate()}>
      {exporting.isPending ? 'Writing the workbook…' : 'Export to Excel'}
    </Action>
  );
}

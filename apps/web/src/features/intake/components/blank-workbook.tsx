import { useState } from 'react';
import { download } from '../../../shared/api/download';
import { Action } from '../../../shared/ui/action';
import { useToast } from '../../../shared/ui/toast';

/** A workbook with a column for each of the line's channels, to be filled in. */
export function BlankWorkbook({ lineId, lineName }: { lineId: number; lineName: string }) {
  const toast = useToast();
  const [isBusy, setIsBusy] = useState(false);
  const fetchIt = async () => {
    setIsBusy(true);
    try {
      await download(`/lines/${lineId}/workbook-template`, `${lineName} readings.xlsx`);
    } catch (error) {
      toast.failed(error);
    } finally {
      setIsBusy(false);
    }
  };
  return (
    <>
      <p>A workbook is taken as the plant writes it. What is in doubt is asked once and remembered for its header.</p>
      <Action kind="plain" isBusy={isBusy} onPress={() => void fetchIt()}>
        Download a blank workbook of {lineName}
      </Action>
    </>
  );
}

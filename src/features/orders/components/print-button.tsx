import { Button, buttonClass } from '@/components/ui/button';
import { problemWords } from '../api/problem-words';
import { useAct } from '../api/use-act';

/** Each print has a code of its own; the paper opens beside this page. */
export function PrintButton({ versionId }: { versionId: string }) {
  const print = useAct('makePrint');
  const run = async () => {
    try {
      const { href } = await print.mutateAsync({ params: { id: versionId }, body: {} });
      window.open(href, '_blank', 'noopener');
    } catch {
      // told beside the button
    }
  };
  if (print.data) {
    return (
      <a className={buttonClass()} href={print.data.href} target="_blank" rel="noreferrer">
        Open the paper
      </a>
    );
  }
  return (
    <>
      {print.error && (
        <span className="note c-brim" role="alert">
          Not printed. {problemWords(print.error)}
        </span>
      )}
      <Button busy={print.isPending} busyLabel="Printing, please wait" onClick={() => void run()}>
        Print
      </Button>
    </>
  );
}

import { Button } from '@/components/ui/button';
import { InlinePanel } from '@/components/ui/inline-panel';

/** The last words could not be kept and the person is on the way to another page. */
export function LeavePanel({
  words,
  onStay,
  onLeave,
}: {
  words: string;
  onStay: () => void;
  onLeave: () => void;
}) {
  return (
    <InlinePanel
      title="The last words are not kept yet"
      tone="ochre"
      aboveBar
      onClose={onStay}
      closeLabel="Stay here"
      actions={<Button onClick={onLeave}>Leave without them</Button>}
    >
      <p>{words || 'They could not be sent to the server.'}</p>
    </InlinePanel>
  );
}

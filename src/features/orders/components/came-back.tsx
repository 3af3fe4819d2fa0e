import { Notice } from '@/components/ui/notice';
import type { Draft } from '@shared/routes/orders';
import { ComparisonTable } from './comparison-table';

/** Why the version before this one came back, over the form that puts it right. */
export function CameBack({ cameBack }: { cameBack: NonNullable<Draft['cameBack']> }) {
  const { words, comparison } = cameBack;
  return (
    <div className="mb-s3">
      <Notice kind="caution" title="The last version came back.">
        {words}
      </Notice>
      {comparison && (
        <details className="mt-s2 text-small">
          <summary className="min-h-[24px] cursor-pointer text-ink-soft">Both sets of figures</summary>
          <ComparisonTable comparison={comparison} />
        </details>
      )}
    </div>
  );
}

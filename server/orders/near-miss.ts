import type { LimitFinding } from '@shared/calc/types';
import { formatNumber } from '@shared/rounding';
import type { NearMiss } from '../db/outcome';
import type { VersionRow } from './facts';

const withUnit = (value: number | undefined, unit: string | undefined): string | null =>
  value === undefined ? null : `${formatNumber(value, 2)}${unit === undefined ? '' : ` ${unit}`}`;

type Subject = Pick<VersionRow, 'id' | 'childId' | 'kind'>;

/** A limit that stopped a draft: kept once for each draft and limit, however often it is typed. */
export const limitMiss = (version: Subject, limit: LimitFinding): NearMiss => ({
  class: limit.strength === 'brim' ? 'brim' : 'senior',
  limitCode: limit.code,
  childId: version.childId,
  versionId: version.id,
  kind: version.kind,
  value: withUnit(limit.value, limit.unit),
  limit: withUnit(limit.limit, limit.unit),
  detail: limit.title,
  dedupe: `${limit.strength}:${version.id}:${limit.code}`,
});

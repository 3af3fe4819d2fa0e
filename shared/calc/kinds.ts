import type { SectionName } from '../rulebook/read';
import { BOLUS_NEEDS, workOutBolus } from './kinds/bolus';
import { MAINTENANCE_NEEDS, workOutMaintenance } from './kinds/maintenance';
import type { Scene } from './scene';
import type { Kind, OrderInputs, WorkOut } from './types';

export type KindModule<K extends Kind = Kind> = {
  /** Rulebook sections without which the kind is refused. */
  needs: readonly SectionName[];
  /** Emergency kinds: senior matters become countersignatures due afterwards. */
  emergency: boolean;
  workOut: (scene: Scene, order: Extract<OrderInputs, { kind: K }>) => WorkOut;
};

/** One line for each kind; the compiler names what a new kind lacks. */
export const KIND_MODULES: { [K in Kind]: KindModule<K> } = {
  maintenance: { needs: MAINTENANCE_NEEDS, emergency: false, workOut: workOutMaintenance },
  bolus: { needs: BOLUS_NEEDS, emergency: true, workOut: workOutBolus },
};

/** Whether senior matters, results and weight age never delay this kind. */
export const isEmergencyKind = (kind: Kind): boolean => KIND_MODULES[kind].emergency;

import type { Scene } from './scene';
import type { BolusOrder, LimitFinding, MaintenanceOrder } from './types';

/** A maintenance order worked out, as its limits look at it; volumes in mL of 24 h, rates in mL/h. */
export type MaintenanceFacts = {
  scene: Scene;
  order: MaintenanceOrder;
  fullMl: number;
  exact: number;
  workedOut: number;
  rate: number;
  intake: number;
  /** What this order and the counted intake come to. */
  totalMl: number;
  ceiling: number;
  /** A rate was typed that is not the worked-out one. */
  differs: boolean;
};

/** A bolus worked out; volumes in mL. */
export type BolusFacts = {
  scene: Scene;
  order: BolusOrder;
  volume: number;
  perKg: number;
  /** This dose and all boluses of 24 h, here and elsewhere. */
  totalPerKg: number;
};

export type MaintenanceLimit = (facts: MaintenanceFacts, found: LimitFinding[]) => void;
export type BolusLimit = (facts: BolusFacts, found: LimitFinding[]) => void;
export type CommonLimit = (scene: Scene, found: LimitFinding[]) => void;

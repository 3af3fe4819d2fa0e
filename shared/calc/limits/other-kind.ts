import type { MaintenanceLimit } from '../facts';
import { broken } from '../findings';

/** Flags under which plain maintenance is a senior's matter: these children have a protocol of their own. */
export const otherKindLimit: MaintenanceLimit = ({ scene }, found) => {
  const { flags } = scene.request.child;
  if (flags.includes('severe-malnutrition')) {
    const text = 'In severe malnutrition feeds come first; any other intravenous fluid needs a senior.';
    found.push(broken('malnutrition-fluid', 'senior', ['Severe malnutrition', text], 'WHO 2013'));
  }
  if (flags.includes('dka')) {
    const text = 'Ketoacidosis has its own fluids; plain maintenance needs a senior.';
    found.push(broken('dka-fluid', 'senior', ['Diabetic ketoacidosis', text], 'common practice'));
  }
};

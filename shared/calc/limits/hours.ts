import { above, formatNumber } from '../../rounding';
import type { MaintenanceLimit } from '../facts';
import { broken } from '../findings';
import { orderLifeHours } from '../order-life';

/** Hours an order may live: 24, half of it on an estimated or old weight; NICE NG29 and ours. */
export const hoursLimit: MaintenanceLimit = ({ scene, order }, found) => {
  const most = orderLifeHours(scene);
  if (!above(order.hours, most)) return;
  const value = formatNumber(most, 2);
  const isHalved = most < scene.rules.maintenance.hoursMost;
  const why = isHalved ? ' because its weight is estimated or old' : '';
  found.push(
    broken(
      'order-life',
      'brim',
      ['Valid for too long', `This order lives ${value} h at most${why}.`],
      scene.sources.maintenance.hoursMost,
      {
        value: order.hours,
        limit: most,
        unit: 'h',
        offer: { field: 'hours', value, label: `Set to ${value} h` },
      },
    ),
  );
};

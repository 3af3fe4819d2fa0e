import type { CommonLimit } from '../facts';
import { broken } from '../findings';

const SHELF = 'the shelf';

/** A product used for a kind, a line or an age the shelf does not permit it for: brim. */
export const fluidListLimit: CommonLimit = ({ request, age }, found) => {
  const { fluid, kind } = request.order;
  const push = (code: string, text: string) =>
    found.push(broken(code, 'brim', ['Not for this use', text], SHELF));
  if (fluid.permittedKinds && !fluid.permittedKinds.includes(kind)) {
    push('fluid-kind', `${fluid.name} is not stocked for ${kind === 'bolus' ? 'a bolus' : 'maintenance'}.`);
  }
  if (fluid.permittedLines && !fluid.permittedLines.includes(request.line)) {
    push(
      'fluid-line',
      `${fluid.name} is not given by ${request.line === 'intraosseous' ? 'an' : 'a'} ${request.line} line.`,
    );
  }
  if (fluid.newbornOnly && !age.isNewborn) push('fluid-newborn', `${fluid.name} is for newborns only.`);
};

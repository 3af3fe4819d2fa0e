import type { Rulebook } from '../rulebook/document';
import { openRulebook, silentOn } from '../rulebook/read';
import { KIND_MODULES } from './kinds';
import type { KindModule } from './kinds';
import { isRefusal, refuse, setScene } from './scene';
import type { BeforeOrder, Refusal, Scene } from './scene';
import type { WorkOut, WorkOutRequest } from './types';

/** Works an order out under a rulebook: figures, workings and limits, or a coded refusal; never a default or a clamp. */
export function workOut(request: WorkOutRequest, rulebook: Rulebook): WorkOut {
  const { order } = request;
  const module = KIND_MODULES[order.kind] as KindModule;
  const scene = openScene(request, rulebook, module);
  return isRefusal(scene) ? scene : module.workOut(scene, order);
}

/** The scene of a request, or why there is none: a silent rulebook or a child outside the scope. */
export function openScene<Request extends BeforeOrder>(
  request: Request,
  rulebook: Rulebook,
  { needs, emergency }: Pick<KindModule, 'needs' | 'emergency'>,
): Scene<Request> | Refusal {
  const open = openRulebook(rulebook);
  const silent = silentOn(open, needs);
  if (silent !== undefined) {
    return refuse(
      'rulebook-silent',
      `Rulebook ${rulebook.number} says nothing of "${silent}": this kind cannot be worked out.`,
    );
  }
  return setScene(request, open, emergency);
}

import { expect, it } from 'vitest';
import { makeStops } from '../../server/start/stops';

it('closes in the reverse order of opening, once', async () => {
  const closed: string[] = [];
  const stops = makeStops(() => undefined);
  stops.onStop(() => closed.push('lock'));
  await stops.track(Promise.resolve('cluster'), (name) => closed.push(name));
  await stops.track(Promise.resolve('server'), (name) => closed.push(name));
  await Promise.all([stops.stopAll(), stops.stopAll()]);
  await stops.stopAll();
  expect(closed).toEqual(['server', 'cluster', 'lock']);
});

it('goes on closing after one that fails, and reports it', async () => {
  const closed: string[] = [];
  const reported: unknown[] = [];
  const stops = makeStops((error) => reported.push(error));
  stops.onStop(() => closed.push('cluster'));
  stops.onStop(() => Promise.reject(new Error('stuck')));
  await stops.stopAll();
  expect(closed).toEqual(['cluster']);
  expect(reported).toEqual([new Error('stuck')]);
});

it('closes what was still opening when the stop came', async () => {
  const closed: string[] = [];
  const stops = makeStops(() => undefined);
  let open: (name: string) => void = () => undefined;
  const opening = new Promise<string>((resolve) => (open = resolve));
  let wentOn = false;
  void stops.track(opening, (name) => closed.push(name)).then(() => (wentOn = true));
  const stopping = stops.stopAll();
  open('cluster');
  await stopping;
  expect(closed).toEqual(['cluster']);
  expect(wentOn).toBe(false);
});

it('has nothing to close of what failed to open', async () => {
  const stops = makeStops(() => expect.unreachable());
  await expect(stops.track(Promise.reject(new Error('no port')), () => expect.unreachable())).rejects.toThrow(
    'no port',
  );
  await stops.stopAll();
});

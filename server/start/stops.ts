/**
 * What has to be closed before the program ends, closed in the reverse order of its opening.
 * Signals may come while something is still being opened: it is closed as soon as it is there.
 */
export type Stops = {
  onStop(close: () => unknown): void;
  /** Waits for something that must be closed later; never resolves once stopping has begun. */
  track<T>(opening: Promise<T>, close: (opened: T) => unknown): Promise<T>;
  stopAll(): Promise<void>;
};

export function makeStops(report: (error: unknown) => void): Stops {
  const closers: (() => unknown)[] = [];
  let stopping: Promise<void> | undefined;

  const closeAll = async () => {
    for (let close = closers.pop(); close; close = closers.pop()) {
      try {
        await close();
      } catch (error) {
        report(error);
      }
    }
  };

  return {
    onStop: (close) => void closers.push(close),
    async track(opening, close) {
      closers.push(async () => {
        const opened = await opening.catch(() => undefined);
        if (opened !== undefined) await close(opened);
      });
      const opened = await opening;
      if (stopping) await new Promise<never>(() => undefined);
      return opened;
    },
    stopAll: () => (stopping ??= closeAll()),
  };
}

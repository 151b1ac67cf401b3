/** Longer than this the hand is held up. */
const SLICE_MS = 8;

/** The items as an array, with pauses in which the page goes on. */
export async function inSlices<T>(items: Iterable<T>): Promise<readonly T[]> {
  const taken: T[] = [];
  let until = performance.now() + SLICE_MS;
  for (const item of items) {
    taken.push(item);
    if (taken.length % 256 !== 0 || performance.now() < until) continue;
    await pause();
    until = performance.now() + SLICE_MS;
  }
  return taken;
}

const pause = () =>
  new Promise<void>((resolve) => {
    const { port1, port2 } = new MessageChannel();
    const end = () => {
      port1.close();
      resolve();
    };
    port1.addEventListener("message", end, { once: true });
    port1.start();
    port2.postMessage(undefined);
  });

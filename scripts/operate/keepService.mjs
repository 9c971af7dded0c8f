/** Keeping a service of our own: when it dies, it is started again at its old place. */
import { isEnding } from './process.mjs';
import { say } from './say.mjs';

/**
 * @template {{ port: number, child: import('node:child_process').ChildProcess,
 *   stop: () => Promise<void> }} Service
 * @param {object} options
 * @param {string} options.name as it is called in messages
 * @param {(port?: number) => Promise<Service>} options.launch
 * @param {(error: unknown) => void} options.onLoss called when it cannot be brought back, or comes
 *   back at another port, of which nobody who depends on it would know
 * @returns {Promise<Service>} the service, whose `stop` ends whichever process stands for it
 */
export async function keepService({ name, launch, onLoss }) {
  let current = await launch();
  let stopping = false;
  let relaunch = Promise.resolve();
  const { port } = current;

  const watch = () => {
    current.child.once('exit', (code, signal) => {
      if (stopping || isEnding()) return;
      say(
        `  ${name} ended ${signal === null ? `with status ${code}` : `by ${signal}`}; it is started again.`,
      );
      relaunch = launch(port).then(
        (next) => {
          current = next;
          if (next.port !== port) onLoss(new Error(`${name} came back at another port.`));
          else watch();
        },
        (error) => {
          if (!stopping && !isEnding()) onLoss(error);
        },
      );
    });
  };
  watch();

  return {
    ...current,
    stop: async () => {
      stopping = true;
      await relaunch;
      await current.stop();
    },
  };
}

import { createServer } from "node:net";

/** Runs one step and says in one line what it did and how long it took. */
export async function step(what, work) {
  const started = performance.now();
  const note = await work();
  const seconds = ((performance.now() - started) / 1000).toFixed(1);
  process.stdout.write(`${what}${note ? `: ${note}` : ""} (${seconds} s)\n`);
  return note;
}

/** Stops with a sentence a person can act on. */
export class Stop extends Error {}

/** A port nobody listens on, or a Stop that names the variable which changes it. */
export const needFreePort = (port, variable) =>
  new Promise((resolve, reject) => {
    const probe = createServer();
    probe.once("error", () =>
      reject(
        new Stop(
          `Port ${port} is taken. Set ${variable} to another one, for example ${variable}=${Number(port) + 1}.`,
        ),
      ),
    );
    probe.listen({ port: Number(port), host: "127.0.0.1", exclusive: true }, () =>
      probe.close(() => resolve(Number(port))),
    );
  });

/** A port the system picks. */
export const anyFreePort = () =>
  new Promise((resolve, reject) => {
    const probe = createServer();
    probe.once("error", reject);
    probe.listen({ port: 0, host: "127.0.0.1" }, () => {
      const { port } = probe.address();
      probe.close(() => resolve(port));
    });
  });

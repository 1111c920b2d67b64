import { randomUUID } from "node:crypto";
import { readFileSync } from "node:fs";
import { request } from "node:http";
import { setTimeout as wait } from "node:timers/promises";
import { startNginx } from "./nginx.mjs";
import { openProduct, signIn } from "./product.mjs";
import { tally } from "./tally.mjs";

// A new version is put in place while people work: two webs behind a proxy, told to stop one after the other under load.

const LOAD_MS = 20_000;
const AT_ONCE = 8;
const MOST_STOPPING_MS = 15_000;
const WORKSHOP = "lou.tanner@saltmarsh.example";
const JPEG = Buffer.from("ffd8ffe000104a46494600010100000100010000ffd9", "hex");

/** What each turn of the load asks for, reading and writing; a write that is lost or done twice shows in the talk. */
const turns = ({ home, headers, number }) => [
  () => fetch(`${home}/workshop-today`, { headers, redirect: "manual" }),
  () => fetch(`${home}/claims/${number}`, { headers, redirect: "manual" }),
  () => fetch(`${home}/api/v1/claims?side=own&view=all`, { headers }),
  (word) =>
    fetch(`${home}/api/v1/claims/${number}/messages`, {
      method: "POST",
      headers: { ...headers, "content-type": "application/json" },
      body: JSON.stringify({ body: word, audience: "own" }),
    }),
];

/** Keeps asking until told to stop; counts what was answered as it should be, and says what was not. */
async function loadUntil(end, asked) {
  const all = turns(asked);
  const found = { answered: 0, broken: [], said: [], slowestMs: 0 };
  const lane = async (at) => {
    for (let turn = at; Date.now() < end; turn += 1) {
      const word = `restart ${randomUUID()}`;
      const started = performance.now();
      const which = turn % all.length;
      try {
        const answer = await all[which](word);
        await answer.arrayBuffer();
        if (answer.status !== 200) found.broken.push(`turn ${which}: ${answer.status}`);
        else found.answered += 1;
        if (which === 3 && answer.status === 200) found.said.push(word);
      } catch (fault) {
        found.broken.push(`turn ${which}: ${fault.cause?.code ?? fault.message}`);
      }
      found.slowestMs = Math.max(found.slowestMs, performance.now() - started);
    }
  };
  await Promise.all(Array.from({ length: AT_ONCE }, (_one, at) => lane(at)));
  return found;
}

/** Sends a file over seconds, as from a bad line, straight to one web; gives its status once it is answered. */
const sendSlowly = ({ port, headers, fields, seconds }) =>
  new Promise((resolve) => {
    const mark = `slow${randomUUID()}`;
    const part = (name, value) =>
      `--${mark}\r\ncontent-disposition: form-data; name="${name}"\r\n\r\n${value}\r\n`;
    const sent = request({
      port,
      host: "127.0.0.1",
      method: "POST",
      path: "/api/v1/evidence",
      headers: { ...headers, "content-type": `multipart/form-data; boundary=${mark}` },
    });
    sent.once("error", (fault) => resolve(fault.code));
    sent.once("response", (answer) => {
      answer.resume();
      answer.once("end", () => resolve(answer.statusCode));
    });
    const fieldParts = Object.entries(fields).map(([name, value]) => part(name, value));
    sent.write(fieldParts.join(""));
    sent.write(
      `--${mark}\r\ncontent-disposition: form-data; name="file"; filename="slow.jpg"\r\ncontent-type: image/jpeg\r\n\r\n`,
    );
    const pieces = Array.from({ length: seconds * 2 }, (_one, at) => (at === 0 ? JPEG : randomUUID()));
    const next = () => {
      const piece = pieces.shift();
      if (piece === undefined) return sent.end(`\r\n--${mark}--\r\n`);
      sent.write(piece);
      return setTimeout(next, 500);
    };
    next();
  });

async function idOf({ DATABASE_URL_ADMIN }, number) {
  const { default: pg } = await import("pg");
  const client = new pg.Client({ connectionString: DATABASE_URL_ADMIN });
  await client.connect();
  const { rows } = await client.query("select id from claims where number = $1", [number.replace("-", "")]);
  await client.end();
  return rows[0].id;
}

/** Tells a process to stop; gives how long it took, and the code it went with. */
async function stop(child) {
  const started = performance.now();
  const gone = new Promise((resolve) => child.once("exit", (code, signal) => resolve(code ?? signal)));
  process.kill(child.pid, "SIGTERM");
  const code = await Promise.race([gone, wait(30_000).then(() => "still there")]);
  return { code, ms: Math.round(performance.now() - started) };
}

/** Lines of a web's log that are no JSON of ours, apart from what the framework says as it starts. */
const foreignLines = (file) =>
  readFileSync(file, "utf8")
    .split("\n")
    .filter((line) => line !== "" && !line.startsWith("{") && !/^\s*([▲✓-]|$)/u.test(line));

async function replace(product, web, { headers, fields, check }) {
  const slow = sendSlowly({ port: web.port, headers, fields, seconds: 5 });
  await wait(1_000);
  const { code, ms } = await stop(web.child);
  const status = await slow;
  check(status === 200, `an upload of 5 s under way when the web is told to stop is taken (${status})`);
  check(
    ms <= MOST_STOPPING_MS,
    `the web has gone after ${ms} ms of at most ${MOST_STOPPING_MS} (code ${code})`,
  );
  return product.startWeb(web.port);
}

/** Gives how many promises were held and how many were not. */
export async function restart(onOpen) {
  const { counted, check } = tally();
  const product = await openProduct();
  onOpen(product.clean);
  const { home, front, environment } = product;
  product.processes.isStopping = true;
  const webs = [await product.startWeb(), await product.startWeb()];
  const nginx = await startNginx({
    folder: `${product.folder}/nginx`,
    port: front,
    webs: webs.map(({ port }) => port),
  });
  try {
    const cookie = await signIn(home, WORKSHOP, environment.DEMO_PASSWORD);
    const headers = { cookie, origin: home };
    const listOf = async (view) =>
      (await (await fetch(`${home}/api/v1/claims?side=own&view=${view}`, { headers })).json()).items;
    const [{ number }] = await listOf("onThem");
    const draft = (await listOf("onUs")).find(({ mark }) => mark === "draft");
    const fields = { claimId: await idOf(environment, draft.number), rowId: "label", kind: "photo" };
    // The framework complains of this in words of its own, with the sender's in them: that is a line of our log too.
    await fetch(`${home}/sign-in`, {
      method: "POST",
      headers: { origin: home, "next-action": `${"0".repeat(40)}\u009b31m`, "content-type": "text/plain" },
      body: "[]",
    });

    const loaded = loadUntil(Date.now() + LOAD_MS, { home, headers, number });
    await wait(3_000);
    for (const web of webs) {
      Object.assign(web, await replace(product, web, { headers, fields, check }));
      await wait(1_000);
    }
    const { answered, broken, said, slowestMs } = await loaded;
    check(
      broken.length === 0 && answered > 50,
      `${answered} requests in ${LOAD_MS / 1000} s over two restarts, ${broken.length} broken, slowest ${Math.round(slowestMs)} ms ${[...new Set(broken)].join("; ")}`,
    );
    const talk = await (await fetch(`${home}/api/v1/claims/${number}/messages`, { headers })).json();
    const kept = talk.messages.map(({ body }) => body).filter((body) => body.startsWith("restart "));
    const lost = said.filter((word) => !kept.includes(word));
    check(
      lost.length === 0 && new Set(kept).size === kept.length,
      `${said.length} messages said in between are there once each (${lost.length} lost, ${kept.length} kept)`,
    );
    const worker = await stop(product.worker);
    check(worker.ms <= MOST_STOPPING_MS, `the worker has gone after ${worker.ms} ms (code ${worker.code})`);
    const foreign = webs.flatMap(({ port }) => foreignLines(product.logOf(port)));
    check(foreign.length === 0, `every line of the webs' logs is ours ${foreign.slice(0, 3).join(" | ")}`);
  } finally {
    await nginx.stop();
    await product.clean();
  }
  return counted;
}

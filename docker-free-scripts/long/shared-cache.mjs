import { existsSync, readdirSync, readFileSync, statSync } from "node:fs";
import { join } from "node:path";
import { root } from "../machine.mjs";
import { SCREENS } from "../screens.mjs";
import { startNginx } from "./nginx.mjs";
import { openProduct, signIn } from "./product.mjs";
import { tally } from "./tally.mjs";

// Two people ask for the same addresses through a proxy that keeps whatever it is not forbidden to keep.

/** What may be made in advance: nothing of anybody. */
const PUBLIC_IN_ADVANCE = ["/_global-error", "/_not-found", "/favicon.ico", "/icon.svg"];

const PEOPLE = [
  { email: "lou.tanner@saltmarsh.example", name: "Lou Tanner" },
  { email: "idris.vale@tworivers.example", name: "Idris Vale" },
  { email: "ada.merrow@larkmoor.example", name: "Ada Merrow" },
  { email: "colin.thorpe@larkmoor.example", name: "Colin Thorpe" },
];

const isPage = (path) => !path.startsWith("/api/");
const VISITORS = Object.values(SCREENS.find(({ email }) => email === null).screens);

/** Addresses of pages and of the API, with those of claims and of their files as this person sees them. */
async function addresses(home, cookie) {
  const read = async (path) => {
    const answer = await fetch(`${home}${path}`, { headers: { cookie } });
    return answer.ok ? answer.json() : {};
  };
  const pages = SCREENS.flatMap(({ screens }) => Object.values(screens)).filter(
    (place) => typeof place === "string",
  );
  const lists = ["/api/v1/claims?side=own&view=all", "/api/v1/claims?side=received&view=all"];
  const { items } = await read(lists[0]);
  const below = [];
  for (const { number } of items.slice(0, 6)) {
    const evidence = `/api/v1/claims/${number}/evidence`;
    below.push(`/claims/${number}`, `/api/v1/claims/${number}/messages`, evidence);
    const { files = [] } = await read(evidence);
    for (const { id } of files.slice(0, 2))
      below.push(`/api/v1/evidence/${id}`, `/api/v1/evidence/${id}/view`);
  }
  return [...new Set([...pages, ...lists, ...below])];
}

/** Asks once; gives the whole answer with what the proxy's cache had to do with it. */
async function ask(place, path, headers) {
  const answer = await fetch(`${place}${path}`, { headers, redirect: "manual" });
  return {
    path,
    status: answer.status,
    body: await answer.text(),
    kept: answer.headers.get("cache-control") ?? "",
    cache: answer.headers.get("x-shared-cache") ?? "",
  };
}

/**
 * Everybody asks for everything through the cache, the first one again after the others, and somebody not signed in last.
 * Beside each answer stands the one the web gives the same person itself.
 */
async function askAll({ home, web, paths, people }) {
  const found = [];
  for (const path of paths)
    for (const form of isPage(path) ? [{}, { rsc: "1" }] : [{}])
      for (const person of [...people, people[0], null]) {
        const headers = { ...form, ...(person ? { cookie: person.cookie } : {}) };
        const [shared, own] = [await ask(home, path, headers), await ask(web, path, headers)];
        found.push({ ...shared, own, person });
      }
  return found;
}

const named = (answers) => [...new Set(answers.map(({ path, status }) => `${path} (${status})`))].join(", ");

function checkAnswers(check, found) {
  const signedIn = found.filter(({ person }) => person !== null);
  const lent = found.filter(({ cache }) => cache === "HIT" || cache === "STALE");
  check(
    lent.length === 0,
    `${found.length} answers by the shared cache, none of them kept from before ${named(lent)}`,
  );
  const crossed = found.filter(
    ({ path, status, body, own, person }) =>
      status !== own.status ||
      (!isPage(path) && status === 200 && body !== own.body) ||
      (person && isPage(path) && status === 200 && !VISITORS.includes(path) && !body.includes(person.name)) ||
      (!person && PEOPLE.some(({ name }) => body.includes(name))),
  );
  check(
    crossed.length === 0,
    `each is the answer its own reader would get without the cache ${named(crossed)}`,
  );
  const open = signedIn.filter(({ kept }) => !kept.includes("private") || !kept.includes("no-store"));
  check(
    open.length === 0,
    `${signedIn.length} answers to people signed in are private, no-store ${named(open)}`,
  );
  const shown = new Set(signedIn.filter(({ status }) => status === 200).map(({ path }) => path));
  check(
    shown.size > 30,
    `${shown.size} addresses of ${new Set(found.map(({ path }) => path)).size} had something to show`,
  );
}

function* filesIn(folder) {
  if (!existsSync(folder)) return;
  for (const name of readdirSync(folder)) {
    const path = join(folder, name);
    if (statSync(path).isDirectory()) yield* filesIn(path);
    else yield path;
  }
}

/** What the build made in advance, and what the framework has kept of answers since. */
function checkBuild(check) {
  const { routes, dynamicRoutes } = JSON.parse(
    readFileSync(join(root, ".next/prerender-manifest.json"), "utf8"),
  );
  const early = [...Object.keys(routes), ...Object.keys(dynamicRoutes)];
  const strange = early.filter((place) => !PUBLIC_IN_ADVANCE.includes(place));
  check(
    strange.length === 0,
    `of ${early.length} routes made in advance none is outside the public list ${strange.join(", ")}`,
  );
  const kept = ["cache", "server/app"].flatMap((place) => [...filesIn(join(root, ".next", place))]);
  const marks = PEOPLE.flatMap(({ email, name }) => [email, name]);
  const told = kept.filter((file) => {
    const text = readFileSync(file, "utf8");
    return marks.some((mark) => text.includes(mark));
  });
  check(
    kept.length > 0 && told.length === 0,
    `no file of ${kept.length} the framework keeps names anybody ${told.join(", ")}`,
  );
}

/** Gives how many promises were held and how many were not. */
export async function sharedCache(onOpen) {
  const { counted, check } = tally();
  const product = await openProduct();
  onOpen(product.clean);
  const { home, front, environment } = product;
  const web = await product.startWeb();
  const nginx = await startNginx({
    folder: `${product.folder}/nginx`,
    port: front,
    webs: [web.port],
    cache: true,
  });
  try {
    const people = [];
    for (const person of PEOPLE)
      people.push({ ...person, cookie: await signIn(home, person.email, environment.DEMO_PASSWORD) });
    // The cache does keep: without this the rest would prove nothing.
    const script = /\/_next\/static\/[^"]+\.js/u.exec((await ask(home, "/sign-in", {})).body)?.[0] ?? "";
    const twice = [await ask(home, script, {}), await ask(home, script, {})].map(({ cache }) => cache);
    check(twice.join() === "MISS,HIT", `what may be kept is kept: ${script} was ${twice.join(", then ")}`);

    const paths = await addresses(home, people[0].cookie);
    checkAnswers(check, await askAll({ home, web: `http://localhost:${web.port}`, paths, people }));
    checkBuild(check);
  } finally {
    await nginx.stop();
    await product.clean();
  }
  return counted;
}

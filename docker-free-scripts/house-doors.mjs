// Who may import whom. Paths are relative to the project and without their ending.
import { basename } from "node:path";

/** The areas of lib, each building on those before it. */
const AREAS =
  "kernel reliability labels access people accounts parts rule-book coverage evidence credits claims alerts evidence-files returns day-book notices recovery imports reports";
const ADAPTERS = ["db", "web", "storage", "mail", "documents", "jobs"];
/** Also with a word before: `doubts-queries`. */
const EDGE_FILE = /(^|-)(queries|service|present|report)$/;
const ROOTS_OF_THE_APP = ["proxy", "instrumentation"];

/** Per kind of file: the kinds it may import, and what to do instead of anything else. */
const DOORS = {
  pure: [["pure"], "a pure file imports pure files only: let an edge file ask and pass the answer in"],
  edge: [
    ["pure", "edge", "model", "adapter", "web", "jobs", "db"],
    "lib serves the screens and knows none of them",
  ],
  adapter: [
    ["pure", "model", "adapter", "web", "jobs", "db"],
    "an adapter knows no area's edges: let the edge call it",
  ],
  web: [
    ["pure", "edge", "model", "adapter", "web", "jobs", "db", "message"],
    "lib serves the screens and knows none of them",
  ],
  jobs: [["pure", "edge", "model", "adapter", "web", "jobs", "db"], "a job calls services, never a screen"],
  db: [["pure", "db"], "lib/db stands below the models"],
  model: [["pure", "model", "db"], "a model knows pure lists and lib/db"],
  ui: [["ui"], "components/ui fits any product: pass it in as a prop"],
  component: [
    ["ui", "component", "pure"],
    "a component takes props and pure rules: let the page read and pass in",
  ],
  app: [
    ["app", "ui", "component", "pure", "web"],
    "a route goes through queries, service, schema and lib/web",
  ],
  migration: [["migration"], "a migration must still run in two years: it imports nothing that changes"],
  seeder: [["seeder", "pure"], "a seeder writes rows itself, because services change"],
  script: [["script"], "a script runs in plain Node, before anything is built"],
};

/** Doors that open for one place only. */
const SIDE_DOORS = [
  { from: "app", to: /^lib\/(.*[/-](queries|service)|reports(\/index)?)$/ },
  { from: "seeder", to: /^lib\/storage\// },
];

const FRAMEWORK = /^(next|react|react-dom|next-auth|next-themes|nuqs)(\/|$)|^next-intl\/server$/;
const DATABASE_AND_SDKS = /^(sequelize|pg|umzug|graphile-worker|nodemailer|formidable)$|^@aws-sdk\//;
const SERVER_ONLY =
  /^(node:|@node-rs\/|@aws-sdk\/)|^(sequelize|pg|umzug|graphile-worker|nodemailer|formidable|sharp|pino|server-only|next-auth)$|^next\/(headers|cache)$/;

const noFramework = [FRAMEWORK, "lib/web is the only folder of lib that knows the framework"];
const CLOSED_PACKAGES = {
  edge: noFramework,
  adapter: noFramework,
  jobs: noFramework,
  db: noFramework,
  model: [FRAMEWORK, "a model knows no framework"],
  migration: [FRAMEWORK, "a migration knows no framework"],
  seeder: [FRAMEWORK, "a seeder knows no framework"],
  ui: [SERVER_ONLY, "a component runs in the browser"],
  component: [SERVER_ONLY, "a component runs in the browser"],
  app: [DATABASE_AND_SDKS, "a route goes through queries and service"],
};

/** The few packages a pure file may stand on: they have no clock, no input and no output. */
const PURE_PACKAGES = [
  { from: /^lib\/kernel\//, name: /^@internationalized\/date$/ },
  // It weighs 90 kB in a browser, so a file that brings it says so in its name.
  { from: /\/[a-z-]*(schema|shapes?|shape-parts)$/, name: /^zod$/ },
  { from: /^lib\/(evidence|imports)\//, name: /^csv-parse\/sync$/ },
];

const KIND_OF_FOLDER = {
  app: "app",
  models: "model",
  migrations: "migration",
  seeders: "seeder",
  messages: "message",
  "docker-free-scripts": "script",
};

/** What kind of file a path is; an area of lib that nobody gave a place is `unplaced`. Tests and configs are `free`. */
function kindOf(path) {
  const [top, area] = path.split("/");
  if (top === "components") return area === "ui" ? "ui" : "component";
  if (top !== "lib") return KIND_OF_FOLDER[top] ?? (ROOTS_OF_THE_APP.includes(path) ? "app" : "free");
  if (ADAPTERS.includes(area)) return area in DOORS ? area : "adapter";
  if (rankOf(path) < 0) return "unplaced";
  return EDGE_FILE.test(basename(path)) || /^lib\/reports(\/index)?$/.test(path) ? "edge" : "pure";
}

const rankOf = (path) => AREAS.split(" ").indexOf(path.split("/")[1]);

/** Why a file may not import another file of ours, or null. */
export function reasonAgainstFile(from, to) {
  const [kind, target] = [kindOf(from), kindOf(to)];
  if (kind === "free") return null;
  if (kind === "unplaced") return "its area has no place in the order of areas: give it one in house-doors";
  if (SIDE_DOORS.some((door) => door.from === kind && door.to.test(to))) return null;
  const [kinds, instead] = DOORS[kind];
  if (!kinds.includes(target)) return instead;
  const goesUp = kind === target && ["pure", "edge"].includes(kind) && rankOf(to) > rankOf(from);
  return goesUp ? "that area stands above: move down what both need, or call from above" : null;
}

/** Why a file may not import a package, or null. */
export function reasonAgainstPackage(from, name) {
  const kind = kindOf(from);
  if (kind === "pure") {
    const isAllowed = PURE_PACKAGES.some((door) => door.from.test(from) && door.name.test(name));
    return isAllowed ? null : "a pure file stands on nothing that has a clock, a screen or a wire";
  }
  const [closed, reason] = CLOSED_PACKAGES[kind] ?? [];
  return closed?.test(name) ? reason : null;
}

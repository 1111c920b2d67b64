import { mkdirSync } from "node:fs";
import { makeStore } from "./object-store/server.mjs";

const { STORE_PORT, STORE_FOLDER, STORE_ACCESS_KEY_ID, STORE_SECRET_ACCESS_KEY } = process.env;
if (!STORE_PORT || !STORE_FOLDER || !STORE_ACCESS_KEY_ID || !STORE_SECRET_ACCESS_KEY) {
  process.stderr.write(
    "object store: STORE_PORT, STORE_FOLDER, STORE_ACCESS_KEY_ID and STORE_SECRET_ACCESS_KEY must be set\n",
  );
  process.exit(2);
}
mkdirSync(STORE_FOLDER, { recursive: true });
const server = makeStore({
  root: STORE_FOLDER,
  credentials: { accessKeyId: STORE_ACCESS_KEY_ID, secretAccessKey: STORE_SECRET_ACCESS_KEY },
});
server.listen(Number(STORE_PORT), "127.0.0.1", () =>
  process.stdout.write(`object store on 127.0.0.1:${STORE_PORT}\n`),
);
for (const signal of ["SIGINT", "SIGTERM"])
  process.on(signal, () => server.close(() => process.exit(0)) && server.closeAllConnections());

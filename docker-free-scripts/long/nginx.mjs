import { spawn } from "node:child_process";
import { existsSync, mkdirSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { isRoot } from "../machine.mjs";
import { waitFor } from "../processes.mjs";

const NGINX = "/usr/sbin/nginx";

/** Whether there is a proxy to stand in front; where not, the sentence that says what to do. */
export const missingNginx = () =>
  existsSync(NGINX) ? null : "nginx is missing: apt-get install nginx-light, then again";

/** What a proxy in front does in any installation: one server, all webs behind it, the client's address overwritten. */
const configOf = ({ folder, port, webs, cache }) => `
${isRoot ? "user root;" : ""}
worker_processes 1;
daemon off;
pid ${folder}/nginx.pid;
error_log ${folder}/error.log warn;
events { worker_connections 512; }
http {
  access_log off;
  client_body_temp_path ${folder}/body;
  proxy_temp_path ${folder}/proxy;
  fastcgi_temp_path ${folder}/fastcgi;
  uwsgi_temp_path ${folder}/uwsgi;
  scgi_temp_path ${folder}/scgi;
  client_max_body_size 60m;
  ${cache ? `proxy_cache_path ${folder}/cache keys_zone=shared:10m inactive=10m;` : ""}
  upstream webs {
    ${webs.map((web) => `server 127.0.0.1:${web} max_fails=1 fail_timeout=1s;`).join("\n    ")}
  }
  server {
    listen 127.0.0.1:${port};
    location / {
      proxy_pass http://webs;
      proxy_http_version 1.1;
      proxy_set_header Connection "";
      proxy_set_header Host $http_host;
      proxy_set_header X-Forwarded-For $remote_addr;
      proxy_set_header X-Forwarded-Host $http_host;
      proxy_set_header X-Forwarded-Proto http;
      proxy_request_buffering off;
      proxy_next_upstream error timeout;
      ${cache ? CACHING : ""}
    }
  }
}
`;

// A cache as careless as one may be: whatever does not forbid it is kept, under its address alone.
const CACHING = `
      proxy_cache shared;
      proxy_cache_key $request_uri$http_rsc;
      proxy_cache_valid any 10m;
      add_header X-Shared-Cache $upstream_cache_status always;`;

/** Starts nginx before these webs and waits until it answers; `stop` ends it. */
export async function startNginx({ folder, port, webs, cache = false }) {
  mkdirSync(folder, { recursive: true });
  writeFileSync(join(folder, "nginx.conf"), configOf({ folder, port, webs, cache }));
  const child = spawn(NGINX, ["-c", join(folder, "nginx.conf"), "-e", join(folder, "error.log")], {
    stdio: "inherit",
  });
  const gone = new Promise((resolve) => child.once("exit", resolve));
  const stop = async () => {
    child.kill("SIGTERM");
    await gone;
  };
  await waitFor(`http://127.0.0.1:${port}/api/v1/health`, { seconds: 30 });
  return { stop };
}

import { readFileSync } from "node:fs";
import { join } from "node:path";
import { describe, expect, it } from "vitest";
import { MUTATIONS } from "../../../docker-free-scripts/mutations/index.mjs";

const ROOT = join(import.meta.dirname, "../../..");

describe("the defences that are taken away to test the tests", () => {
  it.each(MUTATIONS.map(({ name, file, from }) => [name, file, from] as const))(
    "still stand where the table says: %s",
    (_name, file, from) => {
      expect(readFileSync(join(ROOT, file), "utf8")).toContain(from);
    },
  );
});

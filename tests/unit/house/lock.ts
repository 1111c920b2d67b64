import { z } from "zod";

const lockEntry = z.object({
  name: z.string().optional(),
  version: z.string().optional(),
  resolved: z.string().optional(),
  integrity: z.string().optional(),
  inBundle: z.boolean().optional(),
  hasInstallScript: z.boolean().optional(),
});

export const lockShape = z.object({
  lockfileVersion: z.literal(3),
  packages: z.record(z.string(), lockEntry),
});
export type Lock = z.infer<typeof lockShape>;

/** One copy of a package in the tree: a package may be there several times, in several versions. */
export type Copy = z.infer<typeof lockEntry> & { readonly path: string; readonly package: string };

/** Every installed copy of every package; the project itself is none. */
export const copiesIn = (lock: Lock): Copy[] =>
  Object.entries(lock.packages)
    .filter(([path]) => path !== "")
    .map(([path, entry]) => ({
      ...entry,
      path,
      package: entry.name ?? path.replace(/^.*node_modules\//, ""),
    }));

/** Copies older than the floor of their package. A version that is no plain x.y.z counts as older. */
export const copiesBelow = (lock: Lock, floors: Readonly<Record<string, { floor: string }>>): string[] =>
  copiesIn(lock).flatMap((copy) => {
    const floor = floors[copy.package]?.floor;
    return floor !== undefined && isOlder(copy.version ?? "", floor) ? [`${copy.path} ${copy.version}`] : [];
  });

/** Copies whose content nothing vouches for. What a package carries inside itself is covered by its own hash. */
export const copiesWithoutHash = (lock: Lock): string[] =>
  copiesIn(lock)
    .filter((copy) => !copy.inBundle && !/^sha512-[A-Za-z0-9+/]{86}==$/.test(copy.integrity ?? ""))
    .map((copy) => copy.path);

export const packagesWithInstallScript = (lock: Lock): string[] => [
  ...new Set(copiesIn(lock).flatMap((copy) => (copy.hasInstallScript ? [copy.package] : []))),
];

/** Addresses a package would be fetched from that are not the public registry. */
export const foreignAddresses = (lock: Lock): string[] =>
  copiesIn(lock).flatMap(({ resolved }) =>
    resolved === undefined || resolved.startsWith("https://registry.npmjs.org/") ? [] : [resolved],
  );

export const isExactVersion = (version: string): boolean => /^\d+\.\d+\.\d+$/.test(version);

function isOlder(version: string, floor: string): boolean {
  if (!isExactVersion(version)) return true;
  const [left, right] = [version, floor].map((text) => text.split(".").map(Number));
  const difference = right?.map((number, index) => (left?.[index] ?? 0) - number).find((step) => step !== 0);
  return (difference ?? 0) < 0;
}

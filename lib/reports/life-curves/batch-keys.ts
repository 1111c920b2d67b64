type Named = { readonly id: string; readonly code: string; readonly partNumber: string };

/** How the address and the figures name each batch: by its code, with the part number where two parts share a code. */
export function batchKeysOf(batches: readonly Named[]): Map<string, string> {
  const times = new Map<string, number>();
  for (const { code } of batches) times.set(code, (times.get(code) ?? 0) + 1);
  return new Map(
    batches.map(({ id, code, partNumber }) => [
      id,
      (times.get(code) ?? 0) > 1 ? `${code} ${partNumber}` : code,
    ]),
  );
}

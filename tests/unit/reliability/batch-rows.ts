import type { BatchRow } from "@/lib/reliability/batch-screen";

/** Nine batches of four expected and four seen each, and one of interest. */
export const among = (batch: Partial<BatchRow>): BatchRow[] => [
  { id: "B", failures: 4, exposure: 4, ...batch },
  ...Array.from({ length: 9 }, (_, at): BatchRow => ({ id: `other ${at}`, failures: 4, exposure: 4 })),
];

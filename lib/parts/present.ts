import { CATALOGUE_PAGE_SIZE } from "./schema";

export type CatalogueRow = {
  partNumber: string;
  name: string;
  family: string;
  maker: string;
  supersededBy: string | null;
  serialTracked: boolean;
};

/** One page of the catalogue, as it is shown. */
export type CatalogueView = {
  readonly parts: readonly CatalogueRow[];
  readonly total: number;
  readonly page: number;
  readonly pages: number;
};

/** Rows with where they stand among all. */
export const presentCatalogue = (
  parts: readonly CatalogueRow[],
  { total, page }: { total: number; page: number },
): CatalogueView => ({
  parts,
  total,
  page,
  pages: Math.max(1, Math.ceil(total / CATALOGUE_PAGE_SIZE)),
});

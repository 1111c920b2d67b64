/** Where an import is looked at. */
export const importPath = ({ importId }: { readonly importId: string }): `/invoice-lines/${string}` =>
  `/invoice-lines/${importId}`;

/** An original is named by its content: the same bytes are the same object, and no name of a person's reaches a key. */
export const originalKey = (sha256: string): string => `evidence/${sha256.slice(0, 2)}/${sha256}`;

/** The re-encoded copy people look at. */
export const viewKey = (sha256: string): string => `view/${sha256.slice(0, 2)}/${sha256}.jpg`;

/** Where bytes wait until they are known to be whole and of an allowed type. */
export const quarantineKey = (id: string): string => `quarantine/${id}`;

/** An import file, by its content. */
export const importKey = (sha256: string): string => `imports/${sha256.slice(0, 2)}/${sha256}`;

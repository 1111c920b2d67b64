export type LinkPurpose = "reset" | "invitation";

/** Whose link it is; `organisation` is the one that invited, and empty for a reset. */
export type OpenLink = {
  readonly email: string;
  readonly name: string;
  readonly purpose: string;
  readonly organisation: string;
};

/** A place where a person is signed in. */
export type OwnSession = {
  readonly id: string;
  readonly device: string;
  readonly startedAt: Date;
  readonly lastSeenAt: Date;
};

export type Administrator = { readonly id: string; readonly name: string; readonly email: string };

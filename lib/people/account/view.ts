export type LinkPurpose = "reset" | "invitation";

/** Whose link it is; `organisation` is the one that invited, and empty for a reset. */
export type OpenLink = {
  readonly email: string;
  readonly name: string;
  readonly purpose: LinkPurpose;
  readonly organisation: string;
  /** They have a password already, and an invitation leaves it as it is. */
  readonly hasAccount: boolean;
};

/** A place where a person is signed in. */
export type OwnSession = {
  readonly id: string;
  readonly device: string;
  readonly startedAt: Date;
  readonly lastSeenAt: Date;
};

export type Administrator = { readonly id: string; readonly name: string; readonly email: string };

/** An organisation a person works for, and the roles they have there. */
export type Workplace = { readonly id: string; readonly name: string; readonly roles: readonly string[] };

/** A member as far as it matters for who keeps the organisation. */
export type Keeper = {
  readonly id: string;
  readonly isAdministrator: boolean;
  /** Can sign in today: not switched off, and the invitation was accepted. */
  readonly isAtWork: boolean;
};

/** Whether somebody besides this person could keep the organisation. */
export const hasAnotherKeeper = (members: readonly Keeper[], personId: string): boolean =>
  members.some(({ id, isAdministrator, isAtWork }) => id !== personId && isAdministrator && isAtWork);

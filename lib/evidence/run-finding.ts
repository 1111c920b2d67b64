/** Something in a log that a person should look at before believing it. `evidence.findings.<code>` says it in words. */
export type RunFinding = {
  readonly code: RunFindingCode;
  readonly detail: Readonly<Record<string, string | number>>;
};

export type RunFindingCode =
  | "clockStep"
  | "gapInLog"
  | "identicalRows"
  | "flatTemperature"
  | "fallingWhileEnergised"
  | "currentNotFalling"
  | "resistanceJumping"
  | "ambientDrift"
  | "startsWarm";

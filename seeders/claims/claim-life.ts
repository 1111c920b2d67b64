import { MOVES, type ClaimMove, type ClaimState, type VerdictOutcome } from "@/lib/claims/lifecycle";
import { dayInZone, type CalendarDay } from "@/lib/kernel/calendar-day";
import { instantOn, wallTime, workingDayAgo } from "../days";
import type { Chance } from "../random";
import { ORGANISATIONS, type OrganisationKey } from "../story/organisations";
import { PEOPLE, type PersonKey } from "../story/people";
import type { Row } from "../tables";
import type { Case } from "./case";

const FIRST_MINUTE = 8 * 60 + 35;
const LAST_MINUTE = 15 * 60 + 40;
const MINUTES_BETWEEN_STEPS = 11;
const MINUTE_MS = 60_000;
/** Who settles and lapses: no person, but the product's own clock. */
const CLOCK = "Partproof";

type Entry = {
  readonly kind: string;
  readonly by: PersonKey | null;
  readonly detail: Row;
  readonly onlyFor?: OrganisationKey;
};

/** A claim on its way: its state, its clock, and its timeline. Every change of state is checked against the table of moves. */
export class ClaimLife {
  state: ClaimState = "draft";
  outcome: VerdictOutcome | null = null;
  revision = 0;
  updates = 0;
  lastAt: Date;
  readonly entries: Row[] = [];

  constructor(
    readonly claimId: string,
    readonly one: Case,
    private readonly clock: { readonly today: CalendarDay; readonly draw: Chance },
  ) {
    this.lastAt = this.timeOn(one.filedDaysAgo);
  }

  get parties(): { sellerId: string; workshopId: string } {
    return { sellerId: ORGANISATIONS[this.one.seller].id, workshopId: ORGANISATIONS[this.one.workshop].id };
  }

  /** A time of the working day so many days ago, later than everything before it. */
  next(daysAgo: number): Date {
    const least = this.lastAt.getTime() + MINUTES_BETWEEN_STEPS * MINUTE_MS;
    this.lastAt = new Date(Math.max(this.timeOn(daysAgo).getTime(), least));
    return this.lastAt;
  }

  private timeOn(daysAgo: number): Date {
    const { today, draw } = this.clock;
    const minutes = draw.whole(FIRST_MINUTE, LAST_MINUTE);
    return instantOn(workingDayAgo(today, daysAgo), wallTime(minutes, draw.whole(0, 59)), this.sellerZone);
  }

  get sellerZone(): string {
    return ORGANISATIONS[this.one.seller].timeZone;
  }

  /** The day it is at the distributor after the last step. */
  get lastOn(): CalendarDay {
    return dayInZone(this.lastAt, this.sellerZone);
  }

  /** Takes the claim a step on. Throws where the table of moves has no such step. */
  move(move: ClaimMove, by: PersonKey | null, detail: Row): void {
    const { from, to } = MOVES[move];
    if (!from.some((state) => state === this.state))
      throw new RangeError(`${this.one.number} cannot ${move} from ${this.state}`);
    this.state = to;
    // Why a claim was given back to the list is for the distributor alone.
    this.write({ kind: move, by, detail, ...(move === "putBack" ? { onlyFor: this.one.seller } : {}) });
  }

  /** Adds to the timeline what happened without a change of state. */
  write({ kind, by, detail, onlyFor }: Entry): void {
    const person = by === null ? null : PEOPLE[by];
    this.updates += 1;
    this.entries.push({
      claimId: this.claimId,
      seq: 0,
      ...this.parties,
      kind,
      actorId: person?.id ?? null,
      actorName: person?.name ?? CLOCK,
      actorOrganisationId: person ? ORGANISATIONS[person.organisation].id : null,
      onlyForId: onlyFor ? ORGANISATIONS[onlyFor].id : null,
      detail,
      at: this.lastAt,
      prevHash: "",
      hash: "",
    });
  }
}

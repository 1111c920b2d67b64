import "server-only";
import type { Actor } from "@/lib/access/actor";
import type { ClaimState, ReturnState } from "@/lib/claims/lifecycle";
import { todayOf } from "@/lib/access/today-queries";
import { rows, unitOfWork } from "@/lib/db/unit-of-work";
import { addDays, type CalendarDay } from "@/lib/kernel/calendar-day";
import { partMovesOpenTo } from "./lifecycle";

type ClaimRow = {
  id: string;
  sellerId: string;
  workshopId: string;
  claimState: ClaimState;
  holderId: string | null;
  workshopName: string;
  sellerAddress: string;
};
type LineRow = {
  lineId: string;
  lineNumber: number;
  partName: string;
  serial: string | null;
  returnState: ReturnState;
};

export type CallInView = {
  readonly workshopName: string;
  /** Where goods-in is, as the organisation's own address says. */
  readonly sendTo: string;
  readonly dueOn: CalendarDay;
  readonly lines: readonly Omit<LineRow, "returnState">[];
};

/** Days a workshop has to send a part unless the assessor says otherwise. */
const DAYS_TO_SEND = 14;

/** What the form to call a part in starts from; null where this person has nothing to call in on such a claim. */
export const findCallIn = (actor: Actor, claimNumber: string): Promise<CallInView | null> =>
  unitOfWork(actor, async (work) => {
    const [claim] = await rows<ClaimRow>(
      work,
      `select c.id, c.seller_id as "sellerId", c.workshop_id as "workshopId", c.state as "claimState",
         c.holder_id as "holderId", w.name as "workshopName", s.legal_name || E'\\n' || s.address as "sellerAddress"
       from claims c join organisations s on s.id = c.seller_id join organisations w on w.id = c.workshop_id
       where c.number = $1`,
      [claimNumber],
    );
    if (!claim) return null;
    const all = await rows<LineRow>(
      work,
      `select l.id as "lineId", l.line_number as "lineNumber", p.name as "partName",
         coalesce(u.serial, l.serial_typed) as serial, l.return_state as "returnState"
       from claim_lines l join parts p on p.seller_id = l.seller_id and p.id = l.part_id
         left join units u on u.seller_id = l.seller_id and u.id = l.unit_id
       where l.claim_id = $1 order by l.line_number`,
      [claim.id],
    );
    const today = todayOf(actor);
    const lines = all.filter(({ returnState }) =>
      partMovesOpenTo(actor, { ...claim, returnState, dueOn: null }, today).includes("callIn"),
    );
    if (lines.length === 0) return null;
    return {
      workshopName: claim.workshopName,
      sendTo: claim.sellerAddress.trim(),
      dueOn: addDays(today, DAYS_TO_SEND),
      lines: lines.map(({ returnState: _state, ...line }) => line),
    };
  });

import { claimPath } from "@/lib/claims/paths";

export const GOODS_IN = "/goods-in";

/** Where goods-in receives a return and sees where its parts are. */
export const returnPath = (returned: { number: string }): `/goods-in/returns/${string}` =>
  `${GOODS_IN}/returns/${returned.number}`;

/** The bench of one line of a return. */
export const benchPath = (line: { number: string; lineNumber: number }): `/goods-in/returns/${string}` =>
  `${returnPath(line)}/bench/${line.lineNumber}`;

/** A parcel that belongs to no return yet. */
export const parcelPath = (parcel: { id: string }): `/goods-in/parcels/${string}` =>
  `${GOODS_IN}/parcels/${parcel.id}`;

/** Where a claim's return is drawn anew once somebody changed it. */
export const claimOfReturnPath = (returned: { claimNumber: string }): `/claims/${string}` =>
  claimPath({ number: returned.claimNumber });

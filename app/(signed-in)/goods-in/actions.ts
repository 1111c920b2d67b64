"use server";

import { redirect } from "next/navigation";
import type { ActionResult } from "@/lib/kernel/action-result";
import { nestedFields } from "@/lib/kernel/nested-fields";
import { disposePart, recordFinding } from "@/lib/returns/bench-service";
import { matchParcel, noteParcel } from "@/lib/returns/parcel-service";
import { claimOfReturnPath, GOODS_IN, parcelPath, returnPath } from "@/lib/returns/paths";
import { receiveReturn } from "@/lib/returns/receiving-service";
import { disposeInput, findingInput, matchInput, parcelInput, receiveInput } from "@/lib/returns/schema";
import { action } from "@/lib/web/action";

const receive = action(receiveInput, receiveReturn, { toPath: claimOfReturnPath, shapeFields: nestedFields });
const note = action(parcelInput, noteParcel, () => GOODS_IN);
const match = action(matchInput, matchParcel, () => GOODS_IN);
const examine = action(findingInput, recordFinding, { toPath: claimOfReturnPath, shapeFields: nestedFields });
const dispose = action(disposeInput, disposePart, claimOfReturnPath);

/** Receives parts of a return and stays on it: there may be more in the parcel. */
export async function receiveAction(previous: unknown, form: FormData): Promise<ActionResult> {
  const result = await receive(previous, form);
  if (!result.ok) return result;
  return redirect(`${returnPath(result.value)}?note=received`);
}

/** Writes a parcel down and goes on to whose it may be. */
export async function noteAction(previous: unknown, form: FormData): Promise<ActionResult> {
  const result = await note(previous, form);
  if (!result.ok) return result;
  return redirect(parcelPath(result.value));
}

/** Matches a parcel and goes on to receiving its parts. */
export async function matchAction(previous: unknown, form: FormData): Promise<ActionResult> {
  const result = await match(previous, form);
  if (!result.ok) return result;
  return redirect(`${returnPath(result.value)}?parcel=${result.value.parcelId}&note=matched`);
}

/** Writes the finding and goes back to the return. */
export async function examineAction(previous: unknown, form: FormData): Promise<ActionResult> {
  const result = await examine(previous, form);
  if (!result.ok) return result;
  return redirect(`${returnPath(result.value)}?note=examined`);
}

/** Notes where a part ended and goes back to the return. */
export async function disposeAction(previous: unknown, form: FormData): Promise<ActionResult> {
  const result = await dispose(previous, form);
  if (!result.ok) return result;
  return redirect(`${returnPath(result.value)}?note=disposed`);
}

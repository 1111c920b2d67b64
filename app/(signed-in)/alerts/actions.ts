"use server";

import { revalidatePath } from "next/cache";
import { redirect } from "next/navigation";
import { readAllInput } from "@/lib/alerts/schema";
import { markAllRead } from "@/lib/alerts/service";
import { action } from "@/lib/web/action";

const readAll = action(readAllInput, markAllRead);

/** Marks everything the person saw as read; the count in the head of the page is drawn anew with it. */
export async function readAllAction(form: FormData): Promise<void> {
  const result = await readAll(null, form);
  revalidatePath("/", "layout");
  return redirect(result.ok ? "/alerts?note=allRead" : "/alerts");
}

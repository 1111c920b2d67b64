import { notFound, redirect } from "next/navigation";
import { alertId } from "@/lib/alerts/schema";
import { openAlert } from "@/lib/alerts/service";
import { requireSession } from "@/lib/web/session";

type Props = { params: Promise<{ id: string }> };

/** The way from an alert to its claim; whoever takes it has read the alert. Works as a link, in a new tab too. */
export default async function OpenAlertPage({ params }: Props) {
  const [{ actor }, { id }] = await Promise.all([requireSession(), params]);
  const given = alertId.safeParse(id);
  const path = given.success ? await openAlert(actor, given.data) : null;
  if (!path) notFound();
  redirect(path);
}

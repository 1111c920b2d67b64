import type { Route } from "next";
import { redirect } from "next/navigation";
import { pathBack, withNote } from "@/lib/accounts/path-back";

// Which of our pages exist is known to the framework alone; one that does not answers that there is nothing here.
const isRoute = (path: string): path is Route => path.startsWith("/");

/** Goes on to the page a form was opened from, or to its own list; the status line there says what was done. */
export function goBack(form: FormData, list: `/${string}`, note: string): never {
  const asked = form.get("back");
  const path = withNote(pathBack(typeof asked === "string" ? asked : undefined) ?? list, note);
  return redirect(isRoute(path) ? path : "/");
}

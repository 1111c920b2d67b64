import { openNotePdf } from "@/lib/day-book/notes/pdf-queries";
import { noteQuery } from "@/lib/day-book/schema";
import { refuse } from "@/lib/kernel/outcome";
import { route } from "@/lib/web/route";

/** A note as a PDF in the reader's language, for both of its sides. */
export const GET = route<{ number: string }>(
  { name: "GET /credit-notes/{number}/pdf" },
  async ({ session, request, params }) => {
    const { of } = noteQuery.parse(Object.fromEntries(new URL(request.url).searchParams));
    const pdf = await openNotePdf(session.actor, { number: params.number, of });
    return pdf ?? refuse("notFound");
  },
);

import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { AppHeader, PageBody } from "@/components/ui/app-header";
import { PageHeader } from "@/components/ui/page-header";
import { ThemeSwitch } from "@/components/ui/theme-switch";
import { Choices } from "./_sections/choices";
import { Densities } from "./_sections/densities";
import { Fields } from "./_sections/fields";
import { Foundations } from "./_sections/foundations";
import { Marks } from "./_sections/marks";
import { Messages } from "./_sections/messages";
import { Overlays } from "./_sections/overlays";
import { Papers } from "./_sections/papers";
import { Specimen } from "./_sections/specimen";

// Every part and every state of it, in both themes and all three densities. Only while developing; the sample words
// are placeholders and live here, not in the message files.

export const metadata: Metadata = { title: "Style" };

const THEMES = ["light", "dark"] as const;

export default function StylePage() {
  if (process.env.NODE_ENV === "production") notFound();
  return (
    <>
      <AppHeader
        home="/"
        places={[
          { href: "/style", label: "To judge", count: 49 },
          { href: "/claims", label: "Claims" },
          { href: "/goods-in", label: "Goods-in", count: 6 },
          { href: "/life-curves", label: "Life curves" },
          { href: "/batch-watch", label: "Batch watch" },
          { href: "/rule-book", label: "Rule book" },
        ]}
        help={{ href: "/help", label: "Help and keys" }}
      />
      <PageBody>
        <PageHeader title="Style" eyebrow="Development only" actions={<ThemeSwitch />} />
        <div className="-mx-4 grid sm:-mx-6 xl:grid-cols-2">
          {THEMES.map((theme) => (
            <div
              key={theme}
              data-theme={theme}
              className="grid min-w-0 content-start gap-8 bg-paper p-4 text-ink sm:p-6"
            >
              <Specimen />
              <Foundations />
              <Marks />
              <Fields side={theme} />
              <Choices side={theme} />
              <Messages />
              <Papers />
              <Overlays side={theme} />
              <Densities />
            </div>
          ))}
        </div>
      </PageBody>
    </>
  );
}

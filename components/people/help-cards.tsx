import { getTranslations } from "next-intl/server";
import { Card } from "@/components/ui/card";
import { Fact, Facts } from "@/components/ui/facts";
import { KeyHint } from "@/components/ui/key-hint";
import { LIMITS } from "@/lib/kernel/limits";
import type { Administrator } from "@/lib/people/account/view";

const MB = 1_000_000;

export type KeyLine = { readonly words: string; readonly keys: readonly (readonly string[])[] };

/** What the keyboard does. */
export async function KeysCard({ lines }: { lines: readonly KeyLine[] }) {
  const t = await getTranslations("help.keys");
  return (
    <Card id="keys" title={t("title")}>
      <Facts>
        {lines.map(({ words, keys }) => (
          <Fact
            key={words}
            term={
              <span className="flex flex-wrap gap-3">
                {keys.map((held) => (
                  <KeyHint key={held.join()} keys={held} />
                ))}
              </span>
            }
          >
            {words}
          </Fact>
        ))}
      </Facts>
    </Card>
  );
}

/** How large and how many files may be, and of what kind. */
export async function LimitsCard() {
  const t = await getTranslations("help.limits");
  return (
    <Card id="limits" title={t("title")}>
      <Facts>
        <Fact term={t("photo.what")}>{t("photo.limit", { mb: LIMITS.photoBytes / MB })}</Fact>
        <Fact term={t("runLog.what")}>{t("runLog.limit", { mb: LIMITS.runLogBytes / MB })}</Fact>
        <Fact term={t("document.what")}>{t("document.limit", { mb: LIMITS.documentBytes / MB })}</Fact>
        <Fact term={t("claim.what")}>
          {t("claim.limit", { files: LIMITS.filesPerClaim, mb: LIMITS.bytesPerClaim / MB })}
        </Fact>
        <Fact term={t("note.what")}>{t("note.limit", { characters: LIMITS.noteCharacters })}</Fact>
      </Facts>
    </Card>
  );
}

/** Who to ask: the people who keep roles, rules and accounts in one's own organisation. */
export async function AskCard({
  people,
  organisation,
}: {
  people: readonly Administrator[];
  organisation: string;
}) {
  const t = await getTranslations("help.ask");
  return (
    <Card id="ask" title={t("title")}>
      <p className="mb-3 text-ink-2">
        {people.length > 0 ? t("intro", { organisation }) : t("nobody", { organisation })}
      </p>
      {people.length > 0 ? (
        <ul>
          {people.map(({ id, name, email }) => (
            <li
              key={id}
              className="flex flex-wrap items-baseline justify-between gap-x-4 border-t border-rule py-2"
            >
              <span className="font-semibold">{name}</span>
              <a
                href={`mailto:${email}`}
                className="min-h-target content-center text-petrol underline decoration-edge underline-offset-4 hover:text-petrol-deep hover:decoration-current"
              >
                {email}
              </a>
            </li>
          ))}
        </ul>
      ) : null}
      <p className="mt-3 text-small text-ink-2">{t("onClaims")}</p>
    </Card>
  );
}

import { getTranslations } from "next-intl/server";
import { Card } from "@/components/ui/card";
import { SubmitButton } from "@/components/ui/submit-button";
import { Row, RowHead, Table, TableBody, TableHead, Td, Th } from "@/components/ui/table";
import { formatInstant } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";
import type { OwnSession } from "@/lib/people/account/view";
import { deviceName } from "./device-name";

type Send = (form: FormData) => Promise<void>;
type SessionsCardProps = {
  sessions: readonly OwnSession[];
  /** The session of this very request. */
  currentId: string;
  locale: Locale;
  timeZone: string;
  end: Send;
  endOthers: Send;
};

/** Where a person is signed in, and the way to end each of them. */
export async function SessionsCard({
  sessions,
  currentId,
  locale,
  timeZone,
  end,
  endOthers,
}: SessionsCardProps) {
  const t = await getTranslations("account.sessions");
  const nameOf = (agent: string) => {
    const { browser, system } = deviceName(agent);
    if (browser && system) return t("device", { browser, system });
    return browser ?? system ?? t("unknownDevice");
  };
  return (
    <Card id="sessions" title={t("title")} note={t("count", { count: sessions.length })}>
      <Table caption={t("caption")}>
        <TableHead>
          <Th>{t("deviceHead")}</Th>
          <Th>{t("since")}</Th>
          <Th>{t("lastSeen")}</Th>
          <Th>{t("act")}</Th>
        </TableHead>
        <TableBody>
          {sessions.map(({ id, device, startedAt, lastSeenAt }) => (
            <Row key={id} isCurrent={id === currentId}>
              <RowHead>{nameOf(device)}</RowHead>
              <Td label={t("since")}>{formatInstant(startedAt, locale, timeZone)}</Td>
              <Td label={t("lastSeen")}>{formatInstant(lastSeenAt, locale, timeZone)}</Td>
              <Td label={t("act")}>
                {id === currentId ? (
                  t("thisOne")
                ) : (
                  <form action={end}>
                    <input type="hidden" name="session" value={id} />
                    <SubmitButton kind="quiet" small aria-label={t("endNamed", { device: nameOf(device) })}>
                      {t("end")}
                    </SubmitButton>
                  </form>
                )}
              </Td>
            </Row>
          ))}
        </TableBody>
      </Table>
      {sessions.length > 1 ? (
        <form action={endOthers} className="mt-4">
          <SubmitButton kind="secondary">{t("endOthers")}</SubmitButton>
        </form>
      ) : null}
      <p className="mt-4 text-small text-ink-2">{t("hint")}</p>
    </Card>
  );
}

import { useTranslations } from "next-intl";
import { TextLink } from "@/components/ui/link-button";
import { Mark } from "@/components/ui/status-mark";
import { SheetTable } from "@/components/ui/sheet-table";
import { Row, RowHead, Td } from "@/components/ui/table";
import type { Role } from "@/lib/access/roles";

type PersonItem = {
  readonly id: string;
  readonly name: string;
  readonly email: string;
  readonly roles: readonly Role[];
  readonly state: keyof typeof STATES;
  /** As it is read, in the reader's language and zone. */
  readonly lastSeen: string | null;
  readonly isReader: boolean;
};

const STATES = {
  active: { shape: "tickSquare", tone: "proven" },
  invited: { shape: "openDiamond", tone: "wanting" },
  disabled: { shape: "slashedRing", tone: "quiet" },
} as const;

const COLUMNS = ["name", "roles", "lastSeen", "state", "change"] as const;

/** Who is here, what each may do, and when they were last at work. */
export function PersonTable({ people }: { people: readonly PersonItem[] }) {
  const t = useTranslations("people");
  return (
    <SheetTable caption={t("caption")} heads={COLUMNS.map((column) => t(`columns.${column}`))}>
      {people.map((person) => (
        <PersonRow key={person.id} person={person} />
      ))}
    </SheetTable>
  );
}

function PersonRow({ person }: { person: PersonItem }) {
  const t = useTranslations("people");
  const roles = person.roles.map((role) => t(`roles.${role}`)).join(", ");
  return (
    <Row>
      <RowHead>
        {person.name}
        {person.isReader ? <span className="font-normal text-ink-2"> ({t("you")})</span> : null}
        <span className="block text-small font-normal wrap-break-word text-ink-2">{person.email}</span>
      </RowHead>
      <Td label={t("columns.roles")}>{roles || t("noRoles")}</Td>
      <Td label={t("columns.lastSeen")}>
        {person.lastSeen ?? <span className="text-ink-3">{t("never")}</span>}
      </Td>
      <Td label={t("columns.state")}>
        <Mark {...STATES[person.state]} plain>
          {t(`states.${person.state}`)}
        </Mark>
      </Td>
      <Td label={t("columns.change")}>
        <TextLink href={`/people/${person.id}`} aria-label={t("changeOne", { name: person.name })}>
          {t("columns.change")}
        </TextLink>
      </Td>
    </Row>
  );
}

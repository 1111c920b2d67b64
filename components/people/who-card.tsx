import { getTranslations } from "next-intl/server";
import { Card } from "@/components/ui/card";
import { Fact, Facts } from "@/components/ui/facts";
import { ROLES, type Role } from "@/lib/access/roles";

type WhoCardProps = { name: string; email: string; organisation: string; roles: ReadonlySet<Role> };

/** Who a person is here: name, address, organisation and what they may do in it. */
export async function WhoCard({ name, email, organisation, roles }: WhoCardProps) {
  const t = await getTranslations("account.who");
  return (
    <Card id="who" title={t("title")} isInCharge>
      <Facts>
        <Fact term={t("name")}>{name}</Fact>
        <Fact term={t("email")}>{email}</Fact>
        <Fact term={t("organisation")}>{organisation}</Fact>
        <Fact term={t("roles")}>
          <ul>
            {ROLES.filter((role) => roles.has(role)).map((role) => (
              <li key={role}>{t(`role.${role}`)}</li>
            ))}
          </ul>
        </Fact>
      </Facts>
      <p className="mt-4 text-small text-ink-2">{t("change")}</p>
    </Card>
  );
}

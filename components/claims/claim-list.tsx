"use client";

import { useQuery } from "@tanstack/react-query";
import { createColumnHelper, tableFeatures, useTable } from "@tanstack/react-table";
import { useTranslations } from "next-intl";
import { useMemo } from "react";
import { fetchJson } from "@/components/live/fetch-json";
import { Button } from "@/components/ui/button";
import { Card } from "@/components/ui/card";
import { EmptyState } from "@/components/ui/empty-state";
import { LinkButton, TextLink } from "@/components/ui/link-button";
import { Pagination } from "@/components/ui/pagination";
import { Serial } from "@/components/ui/serial";
import { Row, RowHead, Table, TableBody, TableHead, Td, Th } from "@/components/ui/table";
import { TextField } from "@/components/ui/text-field";
import { formatMoney } from "@/lib/kernel/format";
import { money } from "@/lib/kernel/money";
import type { ClaimItem, ClaimItems } from "@/lib/claims/lists/view";
import { DueMark, StateMarks, type Reader, type Side } from "./claim-marks";

type Query = { view: string; order: string; q: string; page: number };
type ClaimListProps = Reader & {
  path: "/judging" | "/workshop-today";
  views: readonly (keyof ClaimItems["counts"])[];
  query: Query;
  initial: ClaimItems;
  side: Side;
};

const features = tableFeatures({});
const helper = createColumnHelper<typeof features, ClaimItem>();
const REFRESH_MS = 20_000;

/** The address of the list in another state; what is usual stays out of it. */
function addressOf<Path extends string>(
  path: Path,
  query: Query,
  change: Partial<Query>,
): `${Path}?${string}` {
  const next = { ...query, page: 1, ...change };
  const search = new URLSearchParams();
  search.set("view", next.view);
  if (next.order !== "urgent") search.set("order", next.order);
  if (next.q) search.set("q", next.q);
  if (next.page > 1) search.set("page", String(next.page));
  return `${path}?${search.toString()}`;
}

const isItems = (value: unknown): value is ClaimItems =>
  typeof value === "object" && value !== null && "items" in value && "counts" in value;

/** A list of claims with its state in the address. It comes from the server and keeps itself fresh. */
export function ClaimList(props: ClaimListProps) {
  const { path, query, initial, side } = props;
  const search = addressOf("/api/v1/claims", query, { page: query.page });
  const { data, isError } = useQuery({
    queryKey: ["claims", side, search],
    queryFn: () => fetchJson(`${search}&side=${side === "distributor" ? "received" : "own"}`),
    refetchInterval: REFRESH_MS,
    enabled: true,
  });
  const list = isItems(data) ? data : initial;
  return (
    <div className="grid gap-4">
      <ListHead {...props} list={list} />
      {isError ? <ListStale /> : null}
      {list.items.length === 0 ? (
        <ListEmpty {...props} />
      ) : (
        <Card isInCharge>
          <ListTable {...props} list={list} />
        </Card>
      )}
      {list.pages > 1 ? (
        <Pagination
          page={query.page}
          pages={list.pages}
          previous={query.page > 1 ? addressOf(path, query, { page: query.page - 1 }) : undefined}
          next={query.page < list.pages ? addressOf(path, query, { page: query.page + 1 }) : undefined}
        />
      ) : null}
    </div>
  );
}

function ListStale() {
  const t = useTranslations("live.lists");
  return <p className="text-wanting">{t("stale")}</p>;
}

function ListHead({ path, views, query, list, side }: ClaimListProps & { list: ClaimItems }) {
  const t = useTranslations("live.lists");
  return (
    <div className="flex flex-wrap items-end justify-between gap-4">
      <nav aria-label={t("views")} className="max-sm:w-full">
        <ul className="grid grid-cols-2 gap-x-2 gap-y-1 sm:flex sm:flex-wrap sm:gap-y-2">
          {views.map((view) => (
            <li key={view}>
              <LinkButton
                href={addressOf(path, query, { view })}
                kind={view === query.view ? "secondary" : "quiet"}
                small
                wide
                aria-current={view === query.view ? "true" : undefined}
              >
                <span className="max-sm:grow max-sm:text-left">{t(`${side}.${view}`)}</span>{" "}
                <span className="text-ink-2 tabular-nums">{list.counts[view] ?? ""}</span>
              </LinkButton>
            </li>
          ))}
        </ul>
      </nav>
      <form action={path} role="search" className="flex items-end gap-2 max-sm:w-full max-sm:[&>div]:grow">
        <input type="hidden" name="view" value={query.view} />
        <TextField name="q" label={t("search")} type="search" defaultValue={query.q} maxLength={80} />
        <Button type="submit" kind="secondary">
          {t("find")}
        </Button>
      </form>
    </div>
  );
}

function ListEmpty({ path, query, side }: ClaimListProps) {
  const t = useTranslations("live.lists");
  if (query.q)
    return (
      <EmptyState
        kind="nothingFound"
        title={t("nothingFound", { q: query.q })}
        action={<LinkButton href={addressOf(path, query, { q: "" })}>{t("clear")}</LinkButton>}
      />
    );
  return <EmptyState kind="allDone" title={t(`empty.${side}`)} />;
}

function ListTable({ path, query, list, side, locale, timeZone }: ClaimListProps & { list: ClaimItems }) {
  const t = useTranslations("live.lists");
  const columns = useMemo(
    () =>
      helper.columns([
        helper.accessor("number", { header: t("columns.number") }),
        helper.accessor("mark", { header: t("columns.state") }),
        helper.accessor("answerDueAt", { header: t("columns.due") }),
        helper.accessor("partName", { header: t("columns.part") }),
        helper.accessor("otherParty", {
          header: t(`columns.${side === "distributor" ? "workshop" : "distributor"}`),
        }),
        helper.accessor("askedMinor", { header: t("columns.asked") }),
      ]),
    [t, side],
  );
  const data = useMemo(() => [...list.items], [list.items]);
  const table = useTable({ features, columns, data });
  const sortOf = (id: string) => {
    const order = ({ answerDueAt: "due", askedMinor: "-asked", number: "-filed" } as const)[id];
    if (!order) return undefined;
    return {
      href: addressOf(path, query, { order }),
      direction:
        query.order === order
          ? order.startsWith("-")
            ? ("descending" as const)
            : ("ascending" as const)
          : undefined,
    };
  };
  return (
    <Table caption={t("caption", { count: list.total })} isHeadSticky>
      <TableHead>
        {table.getHeaderGroups().flatMap((group) =>
          group.headers.map((header) => (
            <Th key={header.id} isNumeric={header.id === "askedMinor"} sort={sortOf(header.id)}>
              <table.FlexRender header={header} />
            </Th>
          )),
        )}
      </TableHead>
      <TableBody>
        {table.getRowModel().rows.map((row) => (
          <ClaimRow
            key={row.original.number}
            item={row.original}
            side={side}
            locale={locale}
            timeZone={timeZone}
          />
        ))}
      </TableBody>
    </Table>
  );
}

function ClaimRow({ item, side, locale, timeZone }: Reader & { item: ClaimItem; side: Side }) {
  const t = useTranslations("live.lists");
  return (
    <Row isAlarming={side === "distributor" && item.safetyReported}>
      <RowHead>
        <TextLink href={`/claims/${item.number}`}>
          <span className="font-mono">{item.number}</span>
        </TextLink>
      </RowHead>
      <Td label={t("columns.state")}>
        <StateMarks item={item} side={side} />
      </Td>
      <Td label={t("columns.due")}>
        <DueMark item={item} side={side} locale={locale} timeZone={timeZone} />
      </Td>
      <Td label={t("columns.part")}>
        {item.partName ?? t("noPart")}
        {item.lineCount > 1 ? ` (${t("lines", { count: item.lineCount })})` : null}
        {item.serial ? (
          <span className="block text-small text-ink-2">
            <Serial value={item.serial} />
          </span>
        ) : null}
      </Td>
      <Td label={t(`columns.${side === "distributor" ? "workshop" : "distributor"}`)}>{item.otherParty}</Td>
      <Td label={t("columns.asked")} isNumeric>
        {formatMoney(money(BigInt(item.askedMinor), item.currency), locale)}
      </Td>
    </Row>
  );
}

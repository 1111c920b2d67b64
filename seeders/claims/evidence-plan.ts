import type { ClaimDraft } from "@/lib/claims/draft";
import { benchRowId } from "@/lib/evidence/bench-rows";
import { workingDayAgo } from "../days";
import type { DialectName } from "../evidence/logs";
import type { PhotoScene, View } from "../evidence/photo/scene";
import type { RunPlan } from "../evidence/thermal";
import { idOf } from "../identity";
import type { Chance } from "../random";
import { ORGANISATIONS, type BuyerKey } from "../story/organisations";
import type { World } from "../story/world";
import type { Case } from "./case";
import { foundOn, hasBenchLog } from "./found";
import { timesIn } from "./plots";
import type { RowAnswer, RowsAsked } from "./rows-asked";
import type { StoryTexts } from "./texts/texts";
import { textsFor } from "./texts/texts-for";

/** What a file of the story holds. `sameAs` is a photo sent a second time. */
export type Content =
  | { readonly is: "photo"; readonly scene: PhotoScene }
  | { readonly is: "sameAs"; readonly key: string }
  | { readonly is: "runLog"; readonly run: RunPlan; readonly dialect: DialectName }
  | { readonly is: "document"; readonly lines: readonly string[] };

export type FilePlan = {
  readonly id: string;
  readonly key: string;
  readonly rowId: string;
  readonly name: string;
  readonly takenDaysAgo: number;
  /** Minutes after midnight on the workshop's clock. */
  readonly takenAtMinutes: number;
  readonly timeZone: string;
  readonly sending: "first" | "second" | "bench";
  readonly content: Content;
};

// What the camera looks at, by row of the list; a row not named here shows the whole part.
const VIEWS: Readonly<Record<string, View>> = {
  label: "label",
  labelWithDate: "label",
  frictionFace: "close",
  brushesAndCommutator: "close",
  pinPhoto: "close",
  shaftAndKey: "close",
  plugPhoto: "meter",
  plugAndFuse: "meter",
  terminalPhoto: "meter",
};

// The reading a meter in the photo shows, and the sign on its display.
const SHOWN: Readonly<Record<string, readonly [rowId: string, sign: string]>> = {
  plugPhoto: ["voltageAtPlug", "V"],
  plugAndFuse: ["openVoltage", "V"],
  terminalPhoto: ["restVoltageFirst", "V"],
};

type Planning = {
  readonly one: Case;
  readonly world: World;
  readonly readings: ClaimDraft["readings"];
  readonly draw: Chance;
};

/** Before the office opens: what is sent the same day is sent later. */
const FIRST_PHOTO_MINUTE = 7 * 60 + 20;

/** The files of a claim, by the rows of its list that take one. */
export function filesOf(one: Case, { answers }: RowsAsked, planning: Omit<Planning, "one">): FilePlan[] {
  return answers.flatMap((answer, place) => {
    const content = contentOf(answer, { one, ...planning });
    if (content === null || answer.how === "never" || answer.how === "excused") return [];
    const key = `${one.key} ${answer.row.id}`;
    const takenDaysAgo = answer.how === "second" ? Math.max(1, one.filedDaysAgo - 4) : one.repairedDaysAgo;
    return [
      {
        id: idOf("evidence", key),
        key,
        rowId: answer.row.id,
        name: nameOf(content, workingDayAgo(planning.world.today, takenDaysAgo), planning.draw),
        takenDaysAgo,
        takenAtMinutes: FIRST_PHOTO_MINUTE + place * 3 + planning.draw.whole(0, 2),
        timeZone: ORGANISATIONS[one.workshop].timeZone,
        sending: answer.how,
        content,
      },
    ];
  });
}

function contentOf({ row }: RowAnswer, planning: Planning): Content | null {
  if (row.accepts === "photo") return { is: "photo", scene: sceneOf(row.id, planning) };
  if (row.accepts === "runLog") return runOf(planning);
  if (row.accepts !== "document") return null;
  const texts = textsFor(planning.one.workshop).documents;
  return {
    is: "document",
    lines: [...texts.capacity, planning.one.lines.map((line) => line.serialTyped).join(", ")],
  };
}

function sceneOf(rowId: string, { one, readings }: Planning): PhotoScene {
  const [line] = one.lines;
  const [shown, sign = ""] = SHOWN[rowId] ?? [];
  const value = shown ? readings[shown]?.raw.replace(",", ".") : undefined;
  const view = VIEWS[rowId] ?? "part";
  return {
    key: `${one.key} ${rowId}`,
    family: one.family,
    view: view === "meter" && value === undefined ? "part" : view,
    label: {
      maker: line.part.maker,
      partNumber: line.part.number,
      rating: ratingOf(line.part.rated),
      serial: line.serialTyped === "" ? "-" : line.serialTyped,
      batch: line.unit?.batch.code ?? "-",
    },
    reading: value === undefined ? null : { value, unit: sign },
    marked: view === "close",
    size: one.isMinor ? "small" : "full",
  };
}

function ratingOf(rated: Readonly<Record<string, string | number>>): string {
  const parts = [`${rated["voltageV"] ?? rated["supplyV"] ?? 24} V DC`];
  if (rated["coilOhm"]) parts.push(`${rated["coilOhm"]} OHM CL ${rated["insulationClass"] ?? ""}`);
  else if (rated["capacityAh"]) parts.push(`${rated["capacityAh"]} AH`);
  else if (rated["powerW"]) parts.push(`${rated["powerW"]} W`);
  else if (rated["currentA"]) parts.push(`${rated["currentA"]} A`);
  return parts.join("  ");
}

const LOGGERS: Readonly<Record<BuyerKey, readonly DialectName[]>> = {
  saltmarsh: ["plain", "clock"],
  tworivers: ["fahrenheit"],
  hollin: ["clock"],
  quayhead: ["semicolon", "germanClock"],
  larkmoor: ["plain"],
};

const SECONDS_PER_ROW = 10;

const runOf = ({ one, draw }: Planning): Content => ({
  is: "runLog",
  run: runPlanOf(one, { seed: draw.fork("run"), words: textsFor(one.workshop).log }),
  dialect: draw.pick(LOGGERS[one.workshop]),
});

/** The bench's own run: as the claim says, a little later, or long enough without a fault. */
function benchRunOf({ one, draw }: Planning): Content {
  const { kind, runMinutes } = foundOn(one, timesIn(one.plot, "examine"));
  const plan = runPlanOf(one, { seed: draw.fork("bench run"), words: textsFor(one.seller).log });
  const isGood = kind === "noFaultFound";
  return {
    is: "runLog",
    run: { ...plan, faultAfterMinutes: isGood ? null : runMinutes, minutes: runMinutes ?? plan.minutes },
    dialect: one.seller === "larkmoor" ? "plain" : "semicolon",
  };
}

type RunOf = { readonly seed: Chance; readonly words: StoryTexts["log"] };

function runPlanOf(one: Case, { seed, words }: RunOf): RunPlan {
  const { coilOhm, windingOhm } = one.lines[0].part.rated;
  const ohmAt20 = typeof coilOhm === "number" ? coilOhm : typeof windingOhm === "number" ? windingOhm : 57.6;
  const { on, brakeFault, fault, off } = words;
  return {
    seed,
    ohmAt20,
    faultAfterMinutes: one.faultAfterMinutes,
    minutes: 45,
    stepS: SECONDS_PER_ROW,
    turns: one.family !== "brake",
    words: { on, off, fault: one.family === "brake" ? brakeFault : fault },
  };
}

function nameOf(content: Content, day: string, draw: Chance): string {
  if (content.is === "runLog") return `run-${day}.csv`;
  if (content.is === "document") return `capacity-${day}.pdf`;
  return `IMG_${draw.whole(1000, 9899)}.jpg`;
}

/** The run log the bench leaves beside its last finding, where it ran the part warm. */
export function benchFilesOf(one: Case, planning: Omit<Planning, "one">): FilePlan[] {
  if (!hasBenchLog(one, timesIn(one.plot, "examine"))) return [];
  const key = `${one.key} ${BENCH_ROW}`;
  const content = benchRunOf({ one, ...planning });
  return [
    {
      id: idOf("evidence", key),
      key,
      rowId: BENCH_ROW,
      name: `bench-${one.number}.csv`,
      takenDaysAgo: one.filedDaysAgo,
      takenAtMinutes: FIRST_PHOTO_MINUTE,
      timeZone: ORGANISATIONS[one.seller].timeZone,
      sending: "bench",
      content,
    },
  ];
}

const BENCH_ROW = benchRowId("runLog", 1);

/** Lets the claim that re-uses a photo show the one of an earlier claim of its workshop, byte for byte. */
export function withPhotoReused(
  plans: ReadonlyMap<Case, readonly FilePlan[]>,
): Map<Case, readonly FilePlan[]> {
  const [reusing] = [...plans.keys()].filter((one) => one.twist === "photoReused");
  if (!reusing) throw new RangeError("No claim of the story re-uses a photo");
  for (const [other, files] of plans) {
    const isElsewhere =
      other !== reusing && other.workshop === reusing.workshop && other.family === reusing.family;
    const shown = isElsewhere ? files.find(({ rowId }) => rowId === REUSED_ROW) : undefined;
    if (!shown) continue;
    const same = { is: "sameAs", key: shown.key } as const;
    const own = plans.get(reusing) ?? [];
    const changed = own.map((file) =>
      file.rowId === REUSED_ROW ? { ...file, name: shown.name, content: same } : file,
    );
    return new Map([...plans, [reusing, changed]]);
  }
  throw new RangeError("There is no earlier photo to re-use");
}

const REUSED_ROW = "frictionFace";

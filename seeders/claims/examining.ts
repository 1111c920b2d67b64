import { FAMILIES } from "@/lib/parts/families";
import type { FindingKind } from "@/lib/returns/kinds";
import { BENCH_PLANS } from "@/lib/returns/bench-plan";
import { readBenchReadings } from "@/lib/returns/bench-readings";
import { PART_MOVES } from "@/lib/returns/lifecycle";
import { idOf } from "../identity";
import { ASSESSORS, PEOPLE } from "../story/people";
import { foundOn } from "./found";
import { typedReading } from "./readings";
import { addRow, lineId, type Scene } from "./scene";
import { tell } from "./returning";
import { uploadFiles } from "./sending";

/** Runs what the family needs and writes down what was found, with the bench's own readings and log. */
export function examine(scene: Scene): void {
  const { one, life, lines, seller } = scene;
  const round = scene.findings + 1;
  const { kind, runMinutes } = foundOn(one, round);
  const bench = ASSESSORS[one.seller].bench;
  uploadBenchLog(scene, kind);
  lines.forEach((line, place) => {
    const id = idOf("finding", life.claimId, round, place);
    addRow(scene, "findings", {
      id,
      claimId: life.claimId,
      lineId: lineId(scene, place),
      ...life.parties,
      kind,
      note: seller.findings[kind],
      runMinutes,
      evidenceId: benchLogId(scene, kind),
      bench: looksOf(scene, kind),
      foundById: PEOPLE[bench].id,
      foundAt: life.lastAt,
    });
    if (kind === "faultConfirmed" || kind === "noFaultFound") addReadings(scene, { findingId: id, place });
    line.returnState = PART_MOVES.examine.to;
  });
  scene.findings = round;
  tell(scene, { move: "examine", by: bench }, { finding: kind, reason: seller.findings[kind] });
}

/** What was looked at before the run, where the part was one that could be run. */
const looksOf = ({ seller, one }: Scene, kind: FindingKind) =>
  kind === "faultConfirmed" || kind === "noFaultFound"
    ? BENCH_PLANS[one.family].flatMap(({ id }) =>
        id === "sameUnit" || id === "marksOfWork" ? [{ step: id, text: seller.looks[id] }] : [],
      )
    : [];

function uploadBenchLog(scene: Scene, kind: FindingKind): void {
  if (kind !== "notTestable") uploadFiles(scene, "bench");
}

const benchLogId = ({ plans }: Scene, kind: FindingKind): string | null =>
  kind === "notTestable" ? null : (plans.find(({ sending }) => sending === "bench")?.id ?? null);

const READINGS_AT_MOST = 2;

function addReadings(scene: Scene, { findingId, place }: { findingId: string; place: number }): void {
  const { one, life, draw } = scene;
  const wanted = BENCH_PLANS[one.family].flatMap((step) => (step.does === "read" ? [step.reading] : []));
  const typed = wanted
    .slice(0, READINGS_AT_MOST)
    .map((code) => [code, typedReading(code, one, draw.fork(findingId))] as const);
  const read = readBenchReadings(Object.fromEntries(typed), FAMILIES[one.family]);
  if (!read.ok) throw new RangeError(`${one.number}: ${read.field ?? ""} ${read.code}`);
  for (const reading of read.value)
    addRow(scene, "readings", {
      id: idOf("reading", findingId, reading.kind),
      claimId: life.claimId,
      ...life.parties,
      revision: life.revision,
      lineNumber: place + 1,
      ...reading,
      takenBy: "goodsIn",
      findingId,
    });
}

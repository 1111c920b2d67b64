/** What was held and what was not; every sentence is printed as it is found out. */
export function tally() {
  const counted = { passed: 0, failed: 0 };
  const check = (isHeld, sentence) => {
    counted[isHeld ? "passed" : "failed"] += 1;
    process.stdout.write(`${isHeld ? "held" : "BROKEN"}: ${sentence}\n`);
  };
  return { counted, check };
}

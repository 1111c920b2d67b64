/** The reports: each answers one question for an actor and the parameters of its address. */
export { readClaimsBehind, readLifeCurves } from "./life-curves/report";

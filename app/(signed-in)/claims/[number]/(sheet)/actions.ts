"use server";

import { contestVerdict } from "@/lib/claims/contesting/service";
import { withdrawClaim } from "@/lib/claims/filing/service";
import { parkClaim, putBackClaim, takeClaim, takeOverClaim } from "@/lib/claims/judging/service";
import { claimPath } from "@/lib/claims/paths";
import { claimInput, parkInput, reasonedInput } from "@/lib/claims/schema";
import { action } from "@/lib/web/action";

export const contestAction = action(reasonedInput, contestVerdict, claimPath);
export const takeAction = action(claimInput, takeClaim, claimPath);
export const takeOverAction = action(claimInput, takeOverClaim, claimPath);
export const putBackAction = action(reasonedInput, putBackClaim, claimPath);
export const parkAction = action(parkInput, parkClaim, claimPath);
export const withdrawAction = action(reasonedInput, withdrawClaim, claimPath);

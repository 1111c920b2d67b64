"use server";

import { acceptVerdict, contestVerdict, reopenClaim } from "@/lib/claims/contesting/service";
import { withdrawClaim } from "@/lib/claims/filing/service";
import { parkClaim, putBackClaim, takeClaim, takeOverClaim } from "@/lib/claims/judging/service";
import { claimPath } from "@/lib/claims/paths";
import { claimInput, parkInput, reasonedInput } from "@/lib/claims/schema";
import { action } from "@/lib/web/action";

export const acceptAction = action(claimInput, acceptVerdict, claimPath);
export const contestAction = action(reasonedInput, contestVerdict, claimPath);
export const takeAction = action(claimInput, takeClaim, claimPath);
export const takeOverAction = action(claimInput, takeOverClaim, claimPath);
export const putBackAction = action(reasonedInput, putBackClaim, claimPath);
export const parkAction = action(parkInput, parkClaim, claimPath);
export const withdrawAction = action(reasonedInput, withdrawClaim, claimPath);
export const reopenAction = action(reasonedInput, reopenClaim, claimPath);

"use server";

import { importPath } from "@/lib/imports/paths";
import { importInput } from "@/lib/imports/schema";
import { importLines } from "@/lib/imports/service";
import { action } from "@/lib/web/action";

export const importLinesAction = action(importInput, importLines, importPath);

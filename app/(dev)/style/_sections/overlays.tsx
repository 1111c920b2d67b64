"use client";

import { RotateCw } from "lucide-react";
import { useState } from "react";
import { Button } from "@/components/ui/button";
import { Card } from "@/components/ui/card";
import { Dialog, DialogActions } from "@/components/ui/dialog";
import { Drawer } from "@/components/ui/drawer";
import { ErrorSummary, type Problem } from "@/components/ui/error-summary";
import { KeyHint } from "@/components/ui/key-hint";
import { Menu, MenuItem, MenuRule } from "@/components/ui/menu";
import { Tooltip } from "@/components/ui/tooltip";

const NONE: readonly Problem[] = [];

/** What lies over the page, and what takes the focus. */
export function Overlays({ side }: { side: string }) {
  const [problems, setProblems] = useState(NONE);
  const fail = () => setProblems([{ fieldId: `${side}-serial`, text: "Serial B0O8 1lI7 is too short." }]);
  return (
    <Card title="Over the page">
      <div className="grid gap-4">
        <ErrorSummary problems={problems} />
        <div className="flex flex-wrap gap-2">
          <Dialog title="Withdraw claim 4107-3826?" trigger={<Button>Open dialog</Button>}>
            <p>The part stays with you. You can file it again as a new claim.</p>
            <DialogActions>
              <Button kind="danger" slot="close">
                Withdraw claim
              </Button>
              <Button kind="quiet" slot="close">
                Keep it open
              </Button>
            </DialogActions>
          </Dialog>
          <Drawer title="14 claims behind this point" trigger={<Button>Open drawer</Button>}>
            <p>B2405, 8 to 9 months in service.</p>
          </Drawer>
          <Menu label="More for this claim" trigger={<Button kind="quiet">More</Button>}>
            <MenuItem aside={<KeyHint keys={["H"]} />}>Park with a colleague</MenuItem>
            <MenuItem href="/style">Open the Rule book</MenuItem>
            <MenuRule />
            <MenuItem isDanger>Withdraw claim</MenuItem>
          </Menu>
          <Tooltip tip="Turn right">
            <Button kind="quiet" aria-label="Turn right">
              <RotateCw aria-hidden="true" className="size-5 stroke-[1.75]" />
            </Button>
          </Tooltip>
          <Button onPress={fail}>Fail a form</Button>
        </div>
      </div>
    </Card>
  );
}

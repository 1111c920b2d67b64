import { Button } from "@/components/ui/button";
import { Card } from "@/components/ui/card";
import { Checkbox } from "@/components/ui/check";
import { CheckboxGroup, RadioGroup } from "@/components/ui/choice-group";
import { FamilyGlyph } from "@/components/ui/family-glyph";
import { LinkButton, TextLink } from "@/components/ui/link-button";
import { RadioTiles } from "@/components/ui/radio-tiles";
import { FAMILY_CODES } from "@/lib/parts/families";

const picture = <FamilyGlyph family={FAMILY_CODES[0] ?? ""} className="size-8" />;
const TILES = [
  { value: "hold", label: "Will not hold", picture },
  { value: "drag", label: "Drags", hint: "Grabs when hot", picture },
  { value: "noise", label: "Noise", picture },
  { value: "dead", label: "Dead", picture },
  { value: "hot", label: "Too hot", picture },
] as const;

/** Buttons, boxes, dots and tiles. */
export function Choices({ side }: { side: string }) {
  return (
    <Card title="Buttons and choices">
      <div className="grid gap-6">
        <div className="flex flex-wrap items-center gap-2">
          <Button kind="primary">Send claim</Button>
          <Button>Save draft</Button>
          <Button kind="quiet">Not now</Button>
          <Button kind="danger">Withdraw claim</Button>
          <Button kind="primary" isPending pendingLabel="Sending">
            Send claim
          </Button>
          <Button small>Retake</Button>
          <Button small kind="quiet">
            Keep it
          </Button>
          <LinkButton href="/style" kind="primary">
            Start a claim
          </LinkButton>
          <TextLink href="/style">Rule 4.2</TextLink>
        </div>
        <RadioTiles name={`${side}-symptom`} label="What does it do?" tiles={TILES} chosen="drag" />
        <RadioGroup
          name={`${side}-side`}
          label="Where was it fitted?"
          choices={[
            { value: "left", label: "Left" },
            { value: "right", label: "Right" },
            { value: "single", label: "Single", hint: "One motor, one brake" },
          ]}
          chosen="left"
        />
        <CheckboxGroup
          name={`${side}-out`}
          label="What did you rule out?"
          choices={[
            { value: "supply", label: "Supply is good under load" },
            { value: "wiring", label: "Wiring is sound" },
          ]}
          chosen={["supply"]}
          error="Tick what you measured, or say why it could not be measured."
        />
        <Checkbox
          name={`${side}-hazard`}
          value="yes"
          label="The battery is swollen, wet or hot"
          hint="It then gets no ordinary label."
        />
      </div>
    </Card>
  );
}

import { Card } from "@/components/ui/card";
import { Combobox } from "@/components/ui/combobox";
import { DateField } from "@/components/ui/date-field";
import { ReadingField } from "@/components/ui/reading-field";
import { Select } from "@/components/ui/select";
import { TextArea } from "@/components/ui/text-area";
import { TextField } from "@/components/ui/text-field";

const BATCHES = ["B2403", "B2404", "B2405"].map((id) => ({ id, label: id, detail: "24 V 4 Nm" }));

/** Typed answers: resting, with a caution, with a problem. */
export function Fields({ side }: { side: string }) {
  return (
    <Card title="Fields">
      <form className="grid gap-5">
        <TextField
          name={`${side}-customer`}
          label="Your own job number"
          hint="As it stands on your job card."
          isOptional
        />
        <TextField
          name={`${side}-serial`}
          label="Serial"
          isSerial
          defaultValue="B0O8 1lI7"
          error="Serial B0O8 1lI7 is too short: four characters are missing. Read the label again."
        />
        <ReadingField
          name={`${side}-coil`}
          label="Coil resistance, cold"
          hint="Measure before it has run today. It tells us whether the coil or the mechanics failed."
          unit="ohm"
          defaultValue="4.2"
          caution="4.2 ohm is far from the usual 9 to 14. Measured on the coil plug? Keep or change."
        />
        <ReadingField
          name={`${side}-volt`}
          label="Release voltage"
          unit="V"
          unitName="volt"
          defaultValue="17,5"
        />
        <DateField
          name={`${side}-fitted`}
          label="Fitted on"
          hint="For example 3 mar 24."
          quickDays={[
            { label: "Today", value: "3 May 2027" },
            { label: "Yesterday", value: "2 May 2027" },
          ]}
        />
        <Select
          name={`${side}-site`}
          label="Site"
          blank="Choose a site"
          options={[
            { value: "harbour", label: "Harbour Road" },
            { value: "mill", label: "Mill Lane" },
          ]}
        />
        <Combobox name={`${side}-batch`} label="Batch" hint="Type a few characters." options={BATCHES} />
        <TextArea
          name={`${side}-note`}
          label="What happened"
          limit={60}
          defaultValue="Grabs after twenty minutes."
        />
        <TextArea
          name={`${side}-long`}
          label="Why we should look again"
          limit={20}
          defaultValue="It held on the stand, not on the hill."
          error="The note is 18 characters over its limit of 20. Shorten it, or send it as a document."
        />
      </form>
    </Card>
  );
}

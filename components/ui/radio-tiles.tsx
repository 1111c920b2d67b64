import clsx from "clsx";
import type { ReactNode } from "react";
import { controlOf, FieldGroup, type FieldText } from "./field";
import { splitField } from "./split-field";

export type Tile = { value: string; label: ReactNode; hint?: ReactNode; picture?: ReactNode };
type RadioTilesProps = FieldText & {
  tiles: readonly Tile[];
  chosen?: string;
  onChange?: (value: string) => void;
};

/** One choice from large tiles, for a thumb in a glove: picture, plain words, and a tick where it was pressed. */
export function RadioTiles({ tiles, chosen, onChange, ...props }: RadioTilesProps) {
  const [field] = splitField(props);
  const { id, name } = controlOf(field);
  return (
    <FieldGroup {...field} isOneOf>
      <div className="grid grid-cols-2 gap-2 sm:grid-cols-3">
        {tiles.map(({ value, label, hint, picture }, index) => (
          <label
            key={value}
            className={clsx(
              picture ? "min-h-24 flex-col justify-between" : "min-h-16 items-center",
              "relative flex cursor-pointer gap-3 rounded-control border border-edge bg-card p-3 hover:border-ink-2 has-checked:border-petrol has-checked:bg-well has-checked:shadow-[inset_0_0_0_1px_var(--petrol)] has-focus-visible:outline-3 has-focus-visible:outline-offset-3 has-focus-visible:outline-focus",
            )}
          >
            <span className={picture ? "flex items-start justify-between gap-2 text-petrol" : "contents"}>
              {picture}
              <input
                type="radio"
                id={index === 0 ? id : `${id}-${index + 1}`}
                name={name}
                value={value}
                defaultChecked={chosen === value}
                onChange={onChange && (() => onChange(value))}
                className="check rounded-full outline-none"
              />
            </span>
            <span className="font-semibold">
              {label}
              {hint ? <span className="block text-small font-normal text-ink-2">{hint}</span> : null}
            </span>
          </label>
        ))}
      </div>
    </FieldGroup>
  );
}

import type { FieldText } from "./field";

/** Parts what belongs round a control from what belongs on it. */
export function splitField<Props extends FieldText>(props: Props): [FieldText, Omit<Props, keyof FieldText>] {
  const { name, id, label, hint, error, caution, isOptional, ...rest } = props;
  return [{ name, id, label, hint, error, caution, isOptional }, rest];
}

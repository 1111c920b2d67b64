// Amounts are whole minor units in bigint, shares are exact fractions: no floating-point number comes near either.
const AMOUNT =
  ":matches(Identifier[name=/^minor$|Minor$/], MemberExpression[property.name=/^minor$|Minor$/])";
const WHOLE =
  "An amount is whole minor units in bigint; multiply it by a fraction (lib/kernel/money.ts) instead.";

/** Syntax the linter refuses wherever amounts of money are reckoned. */
export const MONEY = [
  {
    selector: `CallExpression[callee.name=/^(Number|parseFloat|parseInt)$/] > ${AMOUNT}`,
    message: WHOLE,
  },
  { selector: `UnaryExpression[operator='+'] > ${AMOUNT}`, message: WHOLE },
  { selector: `CallExpression[callee.object.name='Math'] > ${AMOUNT}`, message: WHOLE },
  {
    selector: `CallExpression > MemberExpression[property.name=/^(toFixed|toPrecision)$/] > ${AMOUNT}`,
    message: WHOLE,
  },
  {
    selector: `BinaryExpression[operator=/^[-+*\\u002F]$/]:has(> ${AMOUNT}):has(> Literal[raw=/^[\\d.]+$/])`,
    message: WHOLE,
  },
  {
    selector: "TSPropertySignature[key.name=/Minor$/] > TSTypeAnnotation > TSNumberKeyword",
    message: WHOLE,
  },
];

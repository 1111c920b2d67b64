import nextCoreWebVitals from "eslint-config-next/core-web-vitals";
import nextTypescript from "eslint-config-next/typescript";
import tseslint from "typescript-eslint";
import { MONEY } from "./docker-free-scripts/lint-money.mjs";

// `lib` has two kinds of files: pure ones, and those that touch the world. Only the latter may ask the clock or the dice.
const EDGES = [
  "lib/**/{queries,service,present,report,*-queries,*-service,*-present}.ts",
  "lib/{db,web,storage,mail,documents,jobs}/**",
];

/** The places where a type may be asserted: brands are minted there, or a row becomes a typed thing. */
const ASSERTING = ["lib/kernel/**", "lib/db/**", "lib/web/session.ts", "models/**", "tests/support/**"];

/** Files whose default export a tool or the framework asks for. */
const DEFAULT_EXPORTS = ["*.config.{ts,mjs}", "app/**", "lib/web/i18n.ts"];

// Only a constant in capitals may stand in hand-written SQL; every value is bound.
const pasted =
  ":not(TemplateElement):not(Identifier[name=/^[A-Z][A-Z0-9_]*$/]):not(MemberExpression[object.name=/^[A-Z][A-Z0-9_]*$/])";
const pastedInto = (callee) => [
  {
    selector: `CallExpression[${callee}] > TemplateLiteral > ${pasted}`,
    message: "Bind the value ($1): only constants in CAPITALS may stand in SQL.",
  },
  {
    selector: `CallExpression[${callee}] > BinaryExpression[operator='+']`,
    message: "Bind the value ($1) instead of joining SQL texts.",
  },
];

const SQL = [
  {
    selector: "CallExpression[callee.property.name='literal'][callee.object.name!='z']",
    message: "A literal goes into SQL as it is. Use the model's own conditions, or bound values.",
  },
  {
    selector: "ImportDeclaration[source.value='sequelize'] > ImportSpecifier[imported.name='literal']",
    message: "A literal goes into SQL as it is. Use the model's own conditions, or bound values.",
  },
  ...pastedInto("callee.property.name='query'"),
  ...pastedInto("callee.name=/^(rows|beforeSignIn)$/"),
];

const FORMATS = [
  {
    selector: "CallExpression[callee.property.name=/^toLocale(Date|Time)?String$/]",
    message: "Numbers, money and days are written by lib/kernel/format.ts alone.",
  },
  {
    selector: "MemberExpression[object.name='Intl']",
    message: "Numbers, money and days are written by lib/kernel/format.ts alone.",
  },
];

const CLOCK_AND_DICE = [
  {
    selector: "NewExpression[callee.name='Date'][arguments.length=0]",
    message: "A pure file has no clock: take the day or the instant as an argument.",
  },
  {
    selector: "CallExpression[callee.name='Date']",
    message: "A pure file has no clock: take the day or the instant as an argument.",
  },
  {
    selector: "MemberExpression[object.name=/^(Date|performance)$/][property.name='now']",
    message: "A pure file has no clock: take the day or the instant as an argument.",
  },
  {
    selector: "MemberExpression[object.name='Math'][property.name='random']",
    message: "A pure file rolls no dice: take the number, or its source, as an argument.",
  },
  {
    selector: "MemberExpression[property.name=/^(randomUUID|getRandomValues)$/]",
    message: "A pure file rolls no dice: take the id as an argument.",
  },
  {
    selector: "MemberExpression[object.name='process'][property.name='env']",
    message: "A pure file knows no environment: take the setting as an argument.",
  },
];

// The rules about screens cost seconds, and outside of them they see hooks where there are none.
const offScreen = Object.fromEntries(
  nextCoreWebVitals
    .flatMap(({ rules }) => Object.keys(rules ?? {}))
    .filter((name) => /^(react|react-hooks|jsx-a11y|@next\/next)\//.test(name))
    .map((name) => [name, "off"]),
);

const size = (longestFunction) => ({
  "max-lines": ["error", { max: 300, skipBlankLines: true, skipComments: true }],
  "max-lines-per-function": ["error", { max: longestFunction, skipBlankLines: true, skipComments: true }],
  "max-depth": ["error", 3],
});

const config = [
  {
    ignores: [".next/**", ".local/**", "look/**", "test-results/**", "playwright-report/**", "next-env.d.ts"],
  },
  ...nextCoreWebVitals,
  ...nextTypescript,
  {
    name: "house",
    files: ["**/*.{ts,tsx,mjs}"],
    linterOptions: { reportUnusedDisableDirectives: "error" },
    rules: {
      ...size(60),
      "max-params": ["error", 3],
      eqeqeq: ["error", "always", { null: "ignore" }],
      "import/no-default-export": "error",
      "no-restricted-syntax": ["error", ...SQL, ...FORMATS, ...MONEY],
    },
  },
  {
    name: "house/types",
    files: ["**/*.{ts,tsx}"],
    languageOptions: { parserOptions: { projectService: true, tsconfigRootDir: import.meta.dirname } },
    plugins: { "@typescript-eslint": tseslint.plugin },
    rules: {
      "@typescript-eslint/no-explicit-any": "error",
      "@typescript-eslint/no-non-null-assertion": "error",
      "@typescript-eslint/no-floating-promises": "error",
      "@typescript-eslint/no-misused-promises": "error",
      "@typescript-eslint/switch-exhaustiveness-check": "error",
      "@typescript-eslint/consistent-type-imports": ["error", { fixStyle: "inline-type-imports" }],
      // `as const` is no assertion and stays welcome.
      "@typescript-eslint/consistent-type-assertions": ["error", { assertionStyle: "never" }],
      "@typescript-eslint/no-unused-vars": ["error", { argsIgnorePattern: "^_", varsIgnorePattern: "^_" }],
    },
  },
  { name: "house/components", files: ["**/*.tsx"], rules: size(90) },
  {
    name: "house/default-exports",
    files: DEFAULT_EXPORTS,
    rules: { "import/no-default-export": "off", "import/no-anonymous-default-export": "off" },
  },
  {
    name: "house/assertions",
    files: ASSERTING,
    rules: { "@typescript-eslint/consistent-type-assertions": ["error", { assertionStyle: "as" }] },
  },
  {
    name: "house/matrices",
    files: ["lib/reliability/**"],
    rules: { "@typescript-eslint/no-non-null-assertion": "off" },
  },
  {
    name: "house/pure",
    files: ["lib/**/*.ts"],
    ignores: EDGES,
    rules: { "no-restricted-syntax": ["error", ...SQL, ...FORMATS, ...MONEY, ...CLOCK_AND_DICE] },
  },
  {
    name: "house/format",
    files: ["lib/kernel/format.ts"],
    rules: { "no-restricted-syntax": ["error", ...SQL, ...CLOCK_AND_DICE] },
  },
  {
    // A describe block holds many guarantees and a table of cases many columns; a migration is one long statement.
    name: "house/long-blocks",
    files: ["tests/**", "migrations/**"],
    rules: { "max-lines-per-function": "off", "max-params": "off" },
  },
  {
    name: "house/off-screen",
    files: ["{lib,models,migrations,seeders,tests,docker-free-scripts}/**/*.{ts,mjs}"],
    rules: offScreen,
  },
  {
    // A command is read from top to bottom, step after step, and what it starts is told much.
    name: "house/commands",
    files: ["docker-free-scripts/**"],
    rules: {
      "max-params": ["error", 5],
      "max-lines-per-function": ["error", { max: 110, skipBlankLines: true, skipComments: true }],
    },
  },
  {
    // Statements about roles and databases take no bound values, and nothing a person typed comes near them.
    name: "house/operating",
    files: ["docker-free-scripts/**", "lib/db/migrate.ts"],
    rules: { "no-restricted-syntax": ["error", ...FORMATS] },
  },
  { name: "house/tests", files: ["tests/**"], rules: { "no-restricted-syntax": ["error", ...SQL] } },
  {
    // Prices of the story are written by hand as whole numbers; the product's own engines make amounts of them.
    name: "house/story",
    files: ["seeders/**"],
    rules: { "no-restricted-syntax": ["error", ...SQL, ...FORMATS] },
  },
];

export default config;

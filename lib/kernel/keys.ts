/** The keys of a record written out in the code, with their own type. Only for records nothing is ever added to. */
export const keysOf = <Name extends string>(record: Readonly<Record<Name, unknown>>): Name[] =>
  Object.keys(record) as Name[];

/** How long a session lasts at most, and unused: a week at the bench, a working day where money is decided. */
export const lifeOf = (roles: readonly string[]) =>
  roles.length > 0 && roles.every((role) => role === "technician")
    ? { hours: 168, idleHours: 168 }
    : { hours: 12, idleHours: 8 };

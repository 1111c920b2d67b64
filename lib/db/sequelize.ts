import "server-only";
import { Sequelize } from "sequelize";

const shared = globalThis as typeof globalThis & { partproofDatabase?: Sequelize };

/** The address of the database for this process: the web's, unless the worker set its own before anything was loaded. */
const address = () => {
  const url = process.env.DATABASE_URL;
  if (!url) throw new Error("DATABASE_URL is not set: start the product with npm start");
  return url;
};

const connect = () =>
  new Sequelize(address(), {
    dialect: "postgres",
    logging: false,
    pool: { max: Number(process.env.DATABASE_POOL ?? 8), acquire: 5_000, idle: 30_000, evict: 10_000 },
    define: { underscored: true, timestamps: false },
    // Days stay civil days and instants stay UTC, whatever zone the machine is in.
    timezone: "+00:00",
  });

/**
 * One pool a process. Only the instance outlives a hot reload: models are initialised again each time their module is
 * evaluated, or the first edit would leave classes that nobody initialised.
 */
export const sequelize: Sequelize = (shared.partproofDatabase ??= connect());

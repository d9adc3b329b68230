import type { SequelizeOptions } from 'sequelize-typescript';

/** How the hub talks to MariaDB: typed queries only, every table utf8mb4, column names with underscores. */
export function connectionOptions(databaseUrl: string): SequelizeOptions {
  const url = new URL(databaseUrl);
  return {
    dialect: 'mariadb',
    host: url.hostname,
    port: Number(url.port || 3306),
    username: decodeURIComponent(url.username),
    password: decodeURIComponent(url.password),
    database: decodeURIComponent(url.pathname.slice(1)),
    // Named or shifted zones would pull instants apart between connections; instants are epoch ms anyway.
    timezone: '+00:00',
    logging: false,
    define: { underscored: true, timestamps: false, charset: 'utf8mb4' },
    pool: { max: 10, min: 1, acquire: 12_000, idle: 60_000 },
    dialectOptions: {
      connectTimeout: 5_000,
      // Otherwise an error quotes the values of its statement, and a log would keep hashes of passwords and tokens.
      logParam: false,
      // A wait of 50 s (the default) would hold a tablet's acknowledgement that long.
      initSql: ['SET innodb_lock_wait_timeout = 5', "SET sql_mode = 'STRICT_ALL_TABLES,NO_ENGINE_SUBSTITUTION'"],
    },
  };
}

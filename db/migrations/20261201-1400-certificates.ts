import { createTables, type Migration } from './tables.ts';

export const migration: Migration = createTables({
  certificates: `
    id INT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
    shopId INT UNSIGNED NOT NULL,
    userId INT UNSIGNED NOT NULL,
    name VARCHAR(190) NOT NULL,
    expiresOn DATETIME(3) NULL,
    FOREIGN KEY (shopId) REFERENCES shops (id),
    FOREIGN KEY (userId) REFERENCES users (id)`,
});

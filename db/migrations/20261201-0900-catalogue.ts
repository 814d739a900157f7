import { createTables, type Migration } from './tables.ts';

export const migration: Migration = createTables({
  catalogue_entries: `
    id INT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
    shopId INT UNSIGNED NOT NULL,
    kind VARCHAR(60) NOT NULL DEFAULT '',
    entryId VARCHAR(60) NOT NULL DEFAULT '',
    name VARCHAR(190) NOT NULL DEFAULT '',
    media LONGTEXT NOT NULL DEFAULT '[]',
    otherNames LONGTEXT NOT NULL DEFAULT '[]',
    note TEXT NOT NULL DEFAULT '',
    hidden TINYINT(1) NOT NULL DEFAULT 0,
    version INT NOT NULL DEFAULT 1,
    updatedAt DATETIME(3) NOT NULL,
    UNIQUE KEY entry (shopId, kind, entryId),
    FOREIGN KEY (shopId) REFERENCES shops (id)`,
});

import { createTables, type Migration } from './tables.ts';

export const migration: Migration = createTables({
  audit_entries: `
    id INT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
    shopId INT UNSIGNED NOT NULL,
    caseId INT UNSIGNED NULL,
    subject VARCHAR(60) NOT NULL DEFAULT '',
    subjectId INT UNSIGNED NULL,
    action VARCHAR(60) NOT NULL DEFAULT '',
    detail LONGTEXT NOT NULL DEFAULT '{}',
    byId INT UNSIGNED NULL,
    byName VARCHAR(190) NOT NULL DEFAULT '',
    at DATETIME(3) NOT NULL,
    KEY shopAt (shopId, at),
    KEY caseAt (caseId, at),
    FOREIGN KEY (shopId) REFERENCES shops (id),
    FOREIGN KEY (caseId) REFERENCES cases (id),
    FOREIGN KEY (byId) REFERENCES users (id)`,
});

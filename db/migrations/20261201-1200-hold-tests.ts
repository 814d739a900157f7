import { createTables, type Migration } from './tables.ts';

export const migration: Migration = createTables({
  hold_tests: `
    id INT UNSIGNED NOT NULL AUTO_INCREMENT PRIMARY KEY,
    shopId INT UNSIGNED NOT NULL,
    caseId INT UNSIGNED NOT NULL,
    proofId INT UNSIGNED NOT NULL,
    samples MEDIUMTEXT NOT NULL,
    gauge VARCHAR(20) NOT NULL,
    step DOUBLE NOT NULL,
    litres DOUBLE NOT NULL,
    ambientC DOUBLE NOT NULL,
    altitudeM DOUBLE NOT NULL,
    refrigerant VARCHAR(20) NOT NULL,
    verdict VARCHAR(20) NOT NULL,
    KEY caseId (caseId),
    UNIQUE KEY proofId (proofId),
    FOREIGN KEY (shopId) REFERENCES shops (id),
    FOREIGN KEY (caseId) REFERENCES cases (id) ON DELETE CASCADE,
    FOREIGN KEY (proofId) REFERENCES proofs (id) ON DELETE CASCADE`,
});

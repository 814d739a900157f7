import { statements } from './tables.ts';

/** A charge entry names the cylinder of the book that it drew from or filled; its movement names the entry. */
export const migration = statements({
  up: [
    `ALTER TABLE charges
      ADD COLUMN cylinderId INT UNSIGNED NULL AFTER amountSi,
      ADD KEY cylinderId (cylinderId),
      ADD CONSTRAINT chargeCylinder FOREIGN KEY (cylinderId) REFERENCES cylinders (id)`,
    `ALTER TABLE movements
      ADD COLUMN chargeId INT UNSIGNED NULL AFTER caseId,
      ADD KEY chargeId (chargeId),
      ADD CONSTRAINT movementCharge FOREIGN KEY (chargeId) REFERENCES charges (id) ON DELETE SET NULL`,
  ],
  down: [
    'ALTER TABLE movements DROP FOREIGN KEY movementCharge, DROP COLUMN chargeId',
    'ALTER TABLE charges DROP FOREIGN KEY chargeCylinder, DROP COLUMN cylinderId',
  ],
});

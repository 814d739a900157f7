import { statements } from './tables.ts';

/** Movements are tied to a circuit: what was entered for a machine goes to its first refrigerant circuit. */
export const migration = statements({
  up: [
    `ALTER TABLE movements
      ADD COLUMN circuitId INT UNSIGNED NULL AFTER machineId,
      ADD COLUMN weighedGrams INT NULL AFTER grams,
      ADD KEY circuitId (circuitId),
      ADD CONSTRAINT movementCircuit FOREIGN KEY (circuitId) REFERENCES circuits (id)`,
    `UPDATE movements SET circuitId =
      (SELECT MIN(c.id) FROM circuits c WHERE c.machineId = movements.machineId AND c.medium = 'refrigerant')`,
    `UPDATE movements SET fromAccount = CONCAT('circuit:', circuitId)
      WHERE circuitId IS NOT NULL AND fromAccount = CONCAT('machine:', machineId)`,
    `UPDATE movements SET toAccount = CONCAT('circuit:', circuitId)
      WHERE circuitId IS NOT NULL AND toAccount = CONCAT('machine:', machineId)`,
  ],
  down: [
    `UPDATE movements SET fromAccount = CONCAT('machine:', machineId) WHERE fromAccount = CONCAT('circuit:', circuitId)`,
    `UPDATE movements SET toAccount = CONCAT('machine:', machineId) WHERE toAccount = CONCAT('circuit:', circuitId)`,
    'ALTER TABLE movements DROP FOREIGN KEY movementCircuit',
    'ALTER TABLE movements DROP COLUMN circuitId, DROP COLUMN weighedGrams',
  ],
});

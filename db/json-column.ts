import { DataTypes, type Model, type ModelAttributeColumnOptions } from 'sequelize';

/** A JSON column: MariaDB keeps JSON as text, so it is parsed and written here, in one place. */
export function jsonColumn(field: string, empty: unknown): ModelAttributeColumnOptions {
  return {
    type: DataTypes.TEXT('long'),
    allowNull: false,
    defaultValue: JSON.stringify(empty),
    get(this: Model) {
      const stored: unknown = this.getDataValue(field);
      return typeof stored === 'string' ? JSON.parse(stored) : (stored ?? empty);
    },
    set(this: Model, value: unknown) {
      this.setDataValue(field, JSON.stringify(value));
    },
  };
}

-- A search for a quantity's range reads this index alone: with the unit in it, no reading itself is looked at.

DROP INDEX reading_by_value;
CREATE INDEX reading_by_value ON reading (quantity, unit, value);

-- Whoever holds the database file can drop these; against that stands the chain of hashes, whose head is kept elsewhere.
CREATE TRIGGER `trail_no_update` BEFORE UPDATE ON `trail` BEGIN
  SELECT RAISE(ABORT, 'the trail is append-only');
END;
--> statement-breakpoint
CREATE TRIGGER `trail_no_delete` BEFORE DELETE ON `trail` BEGIN
  SELECT RAISE(ABORT, 'the trail is append-only');
END;
--> statement-breakpoint
-- INSERT OR REPLACE deletes without a delete trigger.
CREATE TRIGGER `trail_no_replace` BEFORE INSERT ON `trail` WHEN EXISTS (SELECT 1 FROM `trail` WHERE `seq` = NEW.`seq`) BEGIN
  SELECT RAISE(ABORT, 'the trail is append-only');
END;

-- What was published stays as it was published.
CREATE TRIGGER edition_never_changes BEFORE UPDATE ON edition
BEGIN SELECT RAISE(ABORT, 'an edition never changes'); END;
--> statement-breakpoint
CREATE TRIGGER edition_never_goes BEFORE DELETE ON edition
BEGIN SELECT RAISE(ABORT, 'an edition is never deleted'); END;
--> statement-breakpoint
-- A delivery that has ended stays ended; `unknown` has not ended, it may be sent once more.
CREATE TRIGGER delivery_stays_ended BEFORE UPDATE ON delivery
WHEN OLD.state IN ('accepted', 'rejected', 'suppressed', 'cancelled', 'expired')
BEGIN SELECT RAISE(ABORT, 'a delivery that has ended never changes'); END;

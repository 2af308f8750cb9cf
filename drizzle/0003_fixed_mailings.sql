-- A mailing that has ended is never sent again.
CREATE TRIGGER mailing_stays_ended BEFORE UPDATE OF state ON mailing
WHEN OLD.state IN ('done', 'cancelled') AND NEW.state <> OLD.state
BEGIN SELECT RAISE(ABORT, 'a mailing that has ended is never sent again'); END;
--> statement-breakpoint
-- What was fixed when sending began is the same for the first recipient and the last.
CREATE TRIGGER mailing_is_fixed
BEFORE UPDATE OF subject, greeting, excerpt, with_hero, html, text, unit_parts, from_name, reply_to, message_date ON mailing
WHEN OLD.state <> 'draft'
BEGIN SELECT RAISE(ABORT, 'a mailing that is being sent never changes'); END;

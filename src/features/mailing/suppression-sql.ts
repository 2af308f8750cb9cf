/**
 * SQL that holds for a delivery `d` whose recipient must not be written to any more: left, not confirmed, or suppressed.
 * Every statement that moves a delivery towards being sent carries it, so that leaving counts up to the last moment.
 */
export const MUST_NOT_BE_SENT = `(
  EXISTS (SELECT 1 FROM suppression x WHERE x.email_key = delivery.email_key)
  OR NOT EXISTS (SELECT 1 FROM subscriber s WHERE s.id = delivery.subscriber_id AND s.state = 'confirmed')
)`;

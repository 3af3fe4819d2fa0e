-- Lists of covered versions go through the partial indexes of live ones.
CREATE OR REPLACE VIEW covered_versions WITH (security_invoker = true) AS
  SELECT v.hospital_id, v.id AS version_id, v.order_id, o.code, v.version, v.child_id, v.kind, v.urgency,
         v.state, v.state_since, v.reason, v.asked_start, v.check_due_at, v.asked_checker, v.signed_at,
         v.is_high_risk, v.live
  FROM order_versions v
  JOIN orders o ON o.hospital_id = v.hospital_id AND o.id = v.order_id;

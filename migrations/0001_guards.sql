-- Row-level security binds the owner too.
DO $$
DECLARE t regclass;
BEGIN
  FOR t IN
    SELECT c.oid::regclass FROM pg_class c
    JOIN pg_namespace n ON n.oid = c.relnamespace AND n.nspname = 'public'
    JOIN pg_attribute a ON a.attrelid = c.oid AND a.attname = 'hospital_id' AND NOT a.attisdropped
    WHERE c.relkind = 'r'
  LOOP
    EXECUTE format('ALTER TABLE %s FORCE ROW LEVEL SECURITY', t);
  END LOOP;
END $$;
--> statement-breakpoint
-- What may be read of a version its checker has not signed. No content, figure, fluid, weight or author.
CREATE VIEW covered_versions WITH (security_invoker = true) AS
  SELECT v.hospital_id, v.id AS version_id, v.order_id, o.code, v.version, v.child_id, v.kind, v.urgency,
         v.state, v.state_since, v.reason, v.asked_start, v.check_due_at, v.asked_checker, v.signed_at, v.is_high_risk
  FROM order_versions v
  JOIN orders o ON o.hospital_id = v.hospital_id AND o.id = v.order_id;
--> statement-breakpoint
CREATE FUNCTION refuse_change() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  RAISE EXCEPTION '% is insert-only: % refused', TG_TABLE_NAME, lower(TG_OP) USING ERRCODE = 'BL001';
END $$;
--> statement-breakpoint
CREATE TRIGGER ledger_insert_only BEFORE UPDATE OR DELETE OR TRUNCATE ON ledger
  FOR EACH STATEMENT EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
CREATE TRIGGER signatures_insert_only BEFORE UPDATE OR DELETE OR TRUNCATE ON signatures
  FOR EACH STATEMENT EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
CREATE TRIGGER infusion_events_insert_only BEFORE UPDATE OR DELETE OR TRUNCATE ON infusion_events
  FOR EACH STATEMENT EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
CREATE TRIGGER order_versions_kept BEFORE DELETE OR TRUNCATE ON order_versions
  FOR EACH STATEMENT EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
CREATE TRIGGER weights_kept BEFORE DELETE OR TRUNCATE ON weights
  FOR EACH STATEMENT EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
CREATE TRIGGER rulebooks_kept BEFORE DELETE OR TRUNCATE ON rulebooks
  FOR EACH STATEMENT EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
CREATE TRIGGER checks_kept BEFORE DELETE OR TRUNCATE ON checks
  FOR EACH STATEMENT EXECUTE FUNCTION refuse_change();
--> statement-breakpoint
-- Signed content, and every column a query reads in its place, is fixed for ever.
CREATE FUNCTION freeze_version() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  IF (NEW.hospital_id, NEW.id, NEW.order_id, NEW.version, NEW.child_id, NEW.kind, NEW.author_id)
     IS DISTINCT FROM (OLD.hospital_id, OLD.id, OLD.order_id, OLD.version, OLD.child_id, OLD.kind, OLD.author_id)
  THEN
    RAISE EXCEPTION 'whose version this is never changes' USING ERRCODE = 'BL001';
  END IF;
  IF OLD.content IS NOT NULL AND
     (NEW.content, NEW.content_sha256, NEW.rulebook_number, NEW.product_id, NEW.is_high_risk, NEW.line_class,
      NEW.weight_id, NEW.weight_kg, NEW.rate_ml_h, NEW.volume_ml, NEW.over_min, NEW.planned_start, NEW.start_by,
      NEW.lapses_at, NEW.signed_at, NEW.given_at, NEW.urgency, NEW.reason, NEW.asked_start)
     IS DISTINCT FROM
     (OLD.content, OLD.content_sha256, OLD.rulebook_number, OLD.product_id, OLD.is_high_risk, OLD.line_class,
      OLD.weight_id, OLD.weight_kg, OLD.rate_ml_h, OLD.volume_ml, OLD.over_min, OLD.planned_start, OLD.start_by,
      OLD.lapses_at, OLD.signed_at, OLD.given_at, OLD.urgency, OLD.reason, OLD.asked_start)
  THEN
    RAISE EXCEPTION 'signed content never changes: revise makes a new version' USING ERRCODE = 'BL001';
  END IF;
  RETURN NEW;
END $$;
--> statement-breakpoint
CREATE TRIGGER order_versions_frozen BEFORE UPDATE ON order_versions
  FOR EACH ROW EXECUTE FUNCTION freeze_version();
--> statement-breakpoint
CREATE FUNCTION freeze_weight() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  IF (NEW.hospital_id, NEW.id, NEW.child_id, NEW.kg, NEW.method, NEW.at, NEW.by_id, NEW.recorded_at)
     IS DISTINCT FROM
     (OLD.hospital_id, OLD.id, OLD.child_id, OLD.kg, OLD.method, OLD.at, OLD.by_id, OLD.recorded_at)
  THEN
    RAISE EXCEPTION 'a weight is corrected by a new row' USING ERRCODE = 'BL001';
  END IF;
  RETURN NEW;
END $$;
--> statement-breakpoint
CREATE TRIGGER weights_frozen BEFORE UPDATE ON weights FOR EACH ROW EXECUTE FUNCTION freeze_weight();
--> statement-breakpoint
CREATE FUNCTION freeze_rulebook() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  IF (NEW.hospital_id, NEW.id, NEW.number, NEW.content, NEW.content_sha256, NEW.drafted_by, NEW.drafted_at)
     IS DISTINCT FROM
     (OLD.hospital_id, OLD.id, OLD.number, OLD.content, OLD.content_sha256, OLD.drafted_by, OLD.drafted_at)
  THEN
    RAISE EXCEPTION 'a rulebook is never edited: draft the next number' USING ERRCODE = 'BL001';
  END IF;
  RETURN NEW;
END $$;
--> statement-breakpoint
CREATE TRIGGER rulebooks_frozen BEFORE UPDATE ON rulebooks FOR EACH ROW EXECUTE FUNCTION freeze_rulebook();
--> statement-breakpoint
-- Lock-in is final.
CREATE FUNCTION freeze_check() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  IF (NEW.hospital_id, NEW.id, NEW.version_id, NEW.author_id, NEW.checker_id)
     IS DISTINCT FROM (OLD.hospital_id, OLD.id, OLD.version_id, OLD.author_id, OLD.checker_id)
     OR OLD.figures IS NOT NULL AND
     (NEW.figures, NEW.figures_sha256, NEW.locked_in_at, NEW.way, NEW.comparison)
     IS DISTINCT FROM (OLD.figures, OLD.figures_sha256, OLD.locked_in_at, OLD.way, OLD.comparison)
  THEN
    RAISE EXCEPTION 'figures that are locked in never change' USING ERRCODE = 'BL001';
  END IF;
  RETURN NEW;
END $$;
--> statement-breakpoint
CREATE TRIGGER checks_frozen BEFORE UPDATE ON checks FOR EACH ROW EXECUTE FUNCTION freeze_check();
--> statement-breakpoint
-- The one way into the ledger. The head row is the lock, taken last in every transaction; whoever waited for it
-- needs a fresh snapshot afterwards, hence read committed only.
CREATE FUNCTION ledger_append(entries text[]) RETURNS bigint
LANGUAGE plpgsql SECURITY DEFINER SET search_path = pg_catalog, pg_temp AS $$
DECLARE
  chain uuid := nullif(current_setting('app.hospital_id', true), '')::uuid;
  head public.ledger_heads%ROWTYPE;
  next_hash bytea;
  line text;
BEGIN
  IF chain IS NULL THEN
    RAISE EXCEPTION 'ledger_append needs app.hospital_id' USING ERRCODE = 'BL002';
  END IF;
  IF current_setting('transaction_isolation') <> 'read committed' THEN
    RAISE EXCEPTION 'ledger_append needs read committed' USING ERRCODE = 'BL002';
  END IF;
  IF coalesce(cardinality(entries), 0) = 0 THEN
    RAISE EXCEPTION 'ledger_append needs an entry' USING ERRCODE = 'BL002';
  END IF;

  SELECT * INTO head FROM public.ledger_heads h WHERE h.hospital_id = chain FOR UPDATE;
  IF NOT FOUND THEN
    INSERT INTO public.ledger_heads (hospital_id, seq, hash) VALUES (chain, 0, decode(repeat('00', 32), 'hex'))
      ON CONFLICT DO NOTHING;
    SELECT * INTO STRICT head FROM public.ledger_heads h WHERE h.hospital_id = chain FOR UPDATE;
  END IF;

  FOREACH line IN ARRAY entries LOOP
    next_hash := sha256(head.hash || int8send(head.seq + 1) || convert_to(line, 'UTF8'));
    INSERT INTO public.ledger (hospital_id, seq, prev, hash, entry)
      VALUES (chain, head.seq + 1, head.hash, next_hash, line);
    head.seq := head.seq + 1;
    head.hash := next_hash;
  END LOOP;

  UPDATE public.ledger_heads h SET seq = head.seq, hash = head.hash WHERE h.hospital_id = chain;
  PERFORM pg_notify('ledger', chain || ':' || head.seq);
  RETURN head.seq;
END $$;
--> statement-breakpoint
CREATE FUNCTION call_outbox() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  PERFORM pg_notify('outbox', current_setting('app.hospital_id', true));
  RETURN NULL;
END $$;
--> statement-breakpoint
CREATE TRIGGER outbox_calls AFTER INSERT ON outbox FOR EACH STATEMENT EXECUTE FUNCTION call_outbox();
--> statement-breakpoint
REVOKE ALL ON FUNCTION ledger_append(text[]), refuse_change(), freeze_version(), freeze_weight(), freeze_rulebook(),
  freeze_check(), call_outbox() FROM PUBLIC;
--> statement-breakpoint
-- The application's role: only what the program does. Nearly nothing is ever deleted.
GRANT USAGE ON SCHEMA public, auth, drizzle TO brimline_app;
--> statement-breakpoint
GRANT SELECT ON drizzle.__drizzle_migrations TO brimline_app;
--> statement-breakpoint
GRANT SELECT ON ALL TABLES IN SCHEMA public TO brimline_app;
--> statement-breakpoint
GRANT EXECUTE ON FUNCTION ledger_append(text[]) TO brimline_app;
--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE ON auth.logins TO brimline_app;
--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON auth.sessions, auth.one_time_tokens TO brimline_app;
--> statement-breakpoint
GRANT INSERT, UPDATE ON wards, accounts, children, stays, products, order_versions, order_counters, checks,
  exceptions, infusions, outbox TO brimline_app;
--> statement-breakpoint
GRANT INSERT, UPDATE, DELETE ON memberships, drafts, check_drafts, answers TO brimline_app;
--> statement-breakpoint
GRANT INSERT ON orders, intakes, fluid_plans, results, weights, heights, rulebooks, seen_figures, signatures,
  infusion_events, prints, near_misses TO brimline_app;
--> statement-breakpoint
GRANT UPDATE (superseded_by) ON intakes, results, heights TO brimline_app;
--> statement-breakpoint
GRANT UPDATE (at) ON seen_figures TO brimline_app;
--> statement-breakpoint
GRANT UPDATE (ended_at, ended_by) ON fluid_plans TO brimline_app;
--> statement-breakpoint
GRANT UPDATE (second_kg, second_method, second_at, second_by, confirmed_by, confirmed_at, superseded_by, superseded_reason)
  ON weights TO brimline_app;
--> statement-breakpoint
GRANT UPDATE (state, approved_by, approved_at, in_force_from, retired_at) ON rulebooks TO brimline_app;

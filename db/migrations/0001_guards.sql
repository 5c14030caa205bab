-- Rules that no statement may break, not even one typed by hand. The guards before INSERT exist because REPLACE deletes
-- without firing a delete trigger.
CREATE TRIGGER template_revisions_place_is_fixed BEFORE UPDATE ON template_revisions
WHEN NEW.id <> OLD.id OR NEW.template_id <> OLD.template_id OR NEW.number <> OLD.number OR NEW.supplied <> OLD.supplied
  OR NEW.created_at <> OLD.created_at OR NEW.created_by <> OLD.created_by
BEGIN
  SELECT RAISE(ABORT, 'template_revisions: place and origin of a revision never change');
END;
--> statement-breakpoint
CREATE TRIGGER template_revisions_content_is_frozen BEFORE UPDATE ON template_revisions
WHEN OLD.state <> 'draft' AND (NEW.definition <> OLD.definition OR NEW.definition_hash <> OLD.definition_hash
  OR NEW.title <> OLD.title OR NEW.engine <> OLD.engine OR NEW.originator_ids <> OLD.originator_ids
  OR NEW.reason_for_change IS NOT OLD.reason_for_change)
BEGIN
  SELECT RAISE(ABORT, 'template_revisions: only a draft changes its content');
END;
--> statement-breakpoint
CREATE TRIGGER template_revisions_issue_is_frozen BEFORE UPDATE ON template_revisions
WHEN OLD.state IN ('issued', 'superseded', 'withdrawn') AND (NEW.submitted_at IS NOT OLD.submitted_at
  OR NEW.submitted_by IS NOT OLD.submitted_by OR NEW.checked_by IS NOT OLD.checked_by
  OR NEW.issued_at IS NOT OLD.issued_at OR NEW.issued_by IS NOT OLD.issued_by
  OR (OLD.adopted_at IS NOT NULL AND (NEW.adopted_at IS NOT OLD.adopted_at OR NEW.adopted_by IS NOT OLD.adopted_by)))
BEGIN
  SELECT RAISE(ABORT, 'template_revisions: who issued a revision, and when, never changes');
END;
--> statement-breakpoint
CREATE TRIGGER template_revisions_state_moves_on BEFORE UPDATE ON template_revisions
WHEN NEW.state <> OLD.state AND (OLD.state || '>' || NEW.state) NOT IN
  ('draft>in_check', 'in_check>draft', 'in_check>issued', 'issued>superseded', 'issued>withdrawn', 'superseded>withdrawn')
BEGIN
  SELECT RAISE(ABORT, 'template_revisions: this change of state is not allowed');
END;
--> statement-breakpoint
CREATE TRIGGER template_revisions_one_issued_on_update BEFORE UPDATE ON template_revisions
WHEN NEW.state = 'issued' AND OLD.state <> 'issued'
  AND EXISTS (SELECT 1 FROM template_revisions r WHERE r.template_id = NEW.template_id AND r.state = 'issued' AND r.id <> NEW.id)
BEGIN
  SELECT RAISE(ABORT, 'template_revisions: another revision is issued');
END;
--> statement-breakpoint
CREATE TRIGGER template_revisions_is_not_replaced BEFORE INSERT ON template_revisions
WHEN EXISTS (SELECT 1 FROM template_revisions r WHERE r.state <> 'draft' AND (r.id = NEW.id OR (r.template_id = NEW.template_id AND (
  r.number = NEW.number OR (r.state = 'issued' AND NEW.state = 'issued')
  OR (r.state = 'in_check' AND NEW.state IN ('draft', 'in_check'))))))
BEGIN
  SELECT RAISE(ABORT, 'template_revisions: a revision that has left the draft is not replaced');
END;
--> statement-breakpoint
CREATE TRIGGER template_revisions_is_kept BEFORE DELETE ON template_revisions
WHEN OLD.state <> 'draft'
BEGIN
  SELECT RAISE(ABORT, 'template_revisions: only a draft is deleted');
END;
--> statement-breakpoint
CREATE TRIGGER templates_slug_is_fixed BEFORE UPDATE ON templates
WHEN NEW.id <> OLD.id OR NEW.slug <> OLD.slug OR NEW.last_number < OLD.last_number
BEGIN
  SELECT RAISE(ABORT, 'templates: the slug is fixed and revision numbers only grow');
END;
--> statement-breakpoint
CREATE TRIGGER material_revisions_place_is_fixed BEFORE UPDATE ON material_revisions
WHEN NEW.id <> OLD.id OR NEW.material_id <> OLD.material_id OR NEW.number <> OLD.number OR NEW.supplied <> OLD.supplied
  OR NEW.created_at <> OLD.created_at OR NEW.created_by <> OLD.created_by
BEGIN
  SELECT RAISE(ABORT, 'material_revisions: place and origin of a revision never change');
END;
--> statement-breakpoint
CREATE TRIGGER material_revisions_content_is_frozen BEFORE UPDATE ON material_revisions
WHEN OLD.state <> 'draft' AND (NEW.definition <> OLD.definition OR NEW.definition_hash <> OLD.definition_hash
  OR NEW.title <> OLD.title OR NEW.engine <> OLD.engine OR NEW.originator_ids <> OLD.originator_ids
  OR NEW.reason_for_change IS NOT OLD.reason_for_change)
BEGIN
  SELECT RAISE(ABORT, 'material_revisions: only a draft changes its content');
END;
--> statement-breakpoint
CREATE TRIGGER material_revisions_issue_is_frozen BEFORE UPDATE ON material_revisions
WHEN OLD.state IN ('issued', 'superseded', 'withdrawn') AND (NEW.submitted_at IS NOT OLD.submitted_at
  OR NEW.submitted_by IS NOT OLD.submitted_by OR NEW.checked_by IS NOT OLD.checked_by
  OR NEW.issued_at IS NOT OLD.issued_at OR NEW.issued_by IS NOT OLD.issued_by
  OR (OLD.adopted_at IS NOT NULL AND (NEW.adopted_at IS NOT OLD.adopted_at OR NEW.adopted_by IS NOT OLD.adopted_by)))
BEGIN
  SELECT RAISE(ABORT, 'material_revisions: who issued a revision, and when, never changes');
END;
--> statement-breakpoint
CREATE TRIGGER material_revisions_state_moves_on BEFORE UPDATE ON material_revisions
WHEN NEW.state <> OLD.state AND (OLD.state || '>' || NEW.state) NOT IN
  ('draft>in_check', 'in_check>draft', 'in_check>issued', 'issued>superseded', 'issued>withdrawn', 'superseded>withdrawn')
BEGIN
  SELECT RAISE(ABORT, 'material_revisions: this change of state is not allowed');
END;
--> statement-breakpoint
CREATE TRIGGER material_revisions_one_issued_on_update BEFORE UPDATE ON material_revisions
WHEN NEW.state = 'issued' AND OLD.state <> 'issued'
  AND EXISTS (SELECT 1 FROM material_revisions r WHERE r.material_id = NEW.material_id AND r.state = 'issued' AND r.id <> NEW.id)
BEGIN
  SELECT RAISE(ABORT, 'material_revisions: another revision is issued');
END;
--> statement-breakpoint
CREATE TRIGGER material_revisions_is_not_replaced BEFORE INSERT ON material_revisions
WHEN EXISTS (SELECT 1 FROM material_revisions r WHERE r.state <> 'draft' AND (r.id = NEW.id OR (r.material_id = NEW.material_id AND (
  r.number = NEW.number OR (r.state = 'issued' AND NEW.state = 'issued')
  OR (r.state = 'in_check' AND NEW.state IN ('draft', 'in_check'))))))
BEGIN
  SELECT RAISE(ABORT, 'material_revisions: a revision that has left the draft is not replaced');
END;
--> statement-breakpoint
CREATE TRIGGER material_revisions_is_kept BEFORE DELETE ON material_revisions
WHEN OLD.state <> 'draft'
BEGIN
  SELECT RAISE(ABORT, 'material_revisions: only a draft is deleted');
END;
--> statement-breakpoint
CREATE TRIGGER materials_slug_is_fixed BEFORE UPDATE ON materials
WHEN NEW.id <> OLD.id OR NEW.slug <> OLD.slug OR NEW.last_number < OLD.last_number
BEGIN
  SELECT RAISE(ABORT, 'materials: the slug is fixed and revision numbers only grow');
END;
--> statement-breakpoint
CREATE TRIGGER records_never_change BEFORE UPDATE ON records
BEGIN
  SELECT RAISE(ABORT, 'records: rows never change');
END;
--> statement-breakpoint
CREATE TRIGGER records_are_kept BEFORE DELETE ON records
BEGIN
  SELECT RAISE(ABORT, 'records: rows are kept');
END;
--> statement-breakpoint
CREATE TRIGGER records_are_not_replaced BEFORE INSERT ON records
WHEN EXISTS (SELECT 1 FROM records r WHERE r.number = NEW.number)
BEGIN
  SELECT RAISE(ABORT, 'records: a row is not replaced');
END;
--> statement-breakpoint
CREATE TRIGGER record_voids_never_change BEFORE UPDATE ON record_voids
BEGIN
  SELECT RAISE(ABORT, 'record_voids: rows never change');
END;
--> statement-breakpoint
CREATE TRIGGER record_voids_are_kept BEFORE DELETE ON record_voids
BEGIN
  SELECT RAISE(ABORT, 'record_voids: rows are kept');
END;
--> statement-breakpoint
CREATE TRIGGER record_voids_are_not_replaced BEFORE INSERT ON record_voids
WHEN EXISTS (SELECT 1 FROM record_voids r WHERE r.record_number = NEW.record_number)
BEGIN
  SELECT RAISE(ABORT, 'record_voids: a row is not replaced');
END;
--> statement-breakpoint
CREATE TRIGGER audit_never_change BEFORE UPDATE ON audit
BEGIN
  SELECT RAISE(ABORT, 'audit: rows never change');
END;
--> statement-breakpoint
CREATE TRIGGER audit_are_kept BEFORE DELETE ON audit
BEGIN
  SELECT RAISE(ABORT, 'audit: rows are kept');
END;
--> statement-breakpoint
CREATE TRIGGER audit_are_not_replaced BEFORE INSERT ON audit
WHEN EXISTS (SELECT 1 FROM audit r WHERE r.seq = NEW.seq)
BEGIN
  SELECT RAISE(ABORT, 'audit: a row is not replaced');
END;

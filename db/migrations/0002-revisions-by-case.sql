-- Why: a case is opened with the newest revision of each of its alternatives. Without an index that
-- starts from the case, opening one case would read through the revisions of all of them.

CREATE INDEX revision_by_case ON revision (case_id, regimen_id, number);

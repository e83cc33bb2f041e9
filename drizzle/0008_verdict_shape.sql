-- Verdicts have another shape from here on. They are findings, found anew at the worker's next look.
DELETE FROM `standing_verdict`;

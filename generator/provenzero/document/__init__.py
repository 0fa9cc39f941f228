"""One module a paper: plans, records and audits as words and figures in print units."""

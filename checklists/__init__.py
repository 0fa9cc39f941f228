"""Jobs, site rules, wording, page templates and fonts: what a site may replace without touching code."""

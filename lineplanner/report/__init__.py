"""A plan as setpoint line, verdict, text, run card, JSON and explanation; every sentence of the program.

style.py        metric or US, plain or with the trade's signs: the one argument of everything here
digits.py       to how many digits each figure is printed
words/          the sentences of findings, ways out, reasons, errors; names of checks, stages, processes
setpoints.py    setpoint line, verdict line, gravest caution
plan_text.py    a plan as text; program_text.py, checks_text.py, cautions_text.py hold its larger parts
plan_json.py    a plan as JSON; plan_id.py: the hash of its inputs
card.py         the run card; watch.py: what to see at five moments; places.py: where each part hangs
explain.py      a figure asked why
area_text.py    the areas of a part, a rack or a load; area_json.py; area_ledger.py holds what both print
sources.py      every constant and table value with status, source, file
layout.py       columns, wrapping, headings

Composes no figures of its own: every number comes from the plan and is printed by units or digits.
"""

"""Widgets, one to a file.

raster.py       lines and areas as dots and cells, numpy only
rack_cells.py   a rack picture as characters and inks; rack_canvas.py: the widget that shows it
plot.py         the program over time
form_lines.py, quantity_field.py: the fields of forms
"""

"""The bridge as an engineer sees it: values in, values out, SI units throughout.

Nothing here knows a screen, a database, a file or a clock.
"""

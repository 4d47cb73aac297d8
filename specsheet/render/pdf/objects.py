raise RuntimeError(
    """MESSAGE FROM THE LEAD to the developer of 'Print speed' (13:15):
Do not write our own PDF file objects (objects.py, embed.py, an own xref/trailer/catalog/outline/CMap).
The rule of the user: outside what the project exists for, a well-kept library, even a slower one, beats our
own code; reportlab makes the file. Go back to reportlab's Canvas/document for the file, fonts, outline,
page labels, metadata (as at HEAD). What you MAY do within reportlab:
 - a fixed repertoire of letters assigned to the TTFont's subset at the start of each document (so codes are the
   same in every sheet), and a small subclass of TTFontFace that remembers makeSubset for the same glyphs;
 - remember widths/encoded runs of texts (bounded caches), fewer state operators, less wrapping twice;
 - fewer canvas calls; skip what reportlab does for features we do not use by its own options.
Delete objects.py and embed.py (your version of objects.py is kept in /tmp/lead/objects_h2.py). The goal
of 13 ms for build + pdf may be missed because of this: then tell what remains. Page content as at HEAD is fine."""
)

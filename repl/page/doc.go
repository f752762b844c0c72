// Package page makes of a session file one self-contained HTML page: its notes
// as text, formulas, replies, tables and pictures. The page needs no network
// and no script; it can be printed, and read on a phone, in the dark and
// without seeing it.
//
// The first note is the title, and notes such as "# 3. How much power is left?"
// are headings with an entry in the contents. Every name links to the line
// that defines it; what was imported stands under Conventions, with file and
// line. The same session gives the same bytes.
package page

// For maintainers. A page is made in two steps: sheetOf lays out what the
// session played as a tree of plain values, and page.html writes them down.
// All text passes through html/template. The one text that does not is a
// picture, which is taken apart and written anew with what picture.go lists,
// so that neither a label nor the drawing library brings markup of its own.
//
// Ids are made of line numbers alone: L12 is line 12 of the session, c2-7 is
// line 7 of the second imported file.

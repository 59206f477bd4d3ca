"""What everything on paper shares: fonts, text folded into lines, pages of marks, head and foot, and the PDF."""

"""The pages of the workbook, over one plan and one cursor."""

"""One self-contained HTML file to a tagged PDF: the same bytes each time."""


class PdfUnavailableError(Exception):
    """The libraries that lay out text for PDF are not on this machine; HTML can still be made."""


def pdf(html: str) -> bytes:
    """The PDF of a document. PdfUnavailableError if the text layout library (Pango) cannot be loaded."""
    try:
        from weasyprint import HTML
        from weasyprint.urls import URLFetcher
    except (ImportError, OSError) as error:
        raise PdfUnavailableError(
            "PDF needs the text layout library Pango, which could not be loaded; "
            f"install it, or ask for HTML instead ({error})"
        ) from error
    made = HTML(string=html, url_fetcher=URLFetcher(allowed_protocols=("data",))).write_pdf(pdf_variant="pdf/ua-1")
    if not isinstance(made, bytes):
        raise TypeError("the PDF library gave no bytes")
    return made
